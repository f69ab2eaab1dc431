/** The whole scenario file as JSON Schema (draft 7), for editors. From the input side: text and numbers as they are typed. */
import * as z from 'zod';
import type { About } from './leaf.ts';
import { caseSchema, headSchema } from './scenario.ts';

type Json = { [key: string]: unknown };

/** Plain JSON. Cases may hold any part of a scenario, and null to remove a key. */
export function scenarioJsonSchema(): Json {
  const head = properties(headSchema);
  const body = properties(caseSchema);
  return {
    $schema: 'http://json-schema.org/draft-07/schema#',
    title: 'Perilag scenario',
    description: 'A planet on a bound orbit: what shines, where it is, what it keeps and sends back',
    type: 'object',
    properties: {
      ...head,
      ...body,
      cases: {
        title: 'Cases',
        description:
          'Exactly these run, in this order; each lays its changes over the scenario, {} is the scenario as it stands',
        type: 'object',
        minProperties: 1,
        additionalProperties: { type: 'object', properties: mapped(body, asChange), additionalProperties: false },
      },
    },
    additionalProperties: false,
  };
}

function properties(schema: z.ZodObject): Json {
  const json = z.toJSONSchema(schema, {
    io: 'input',
    target: 'draft-7',
    override: ({ zodSchema, jsonSchema }) => {
      // A converted value loses its examples, which are given as they are typed.
      const examples = (z.globalRegistry.get(zodSchema) as About | undefined)?.examples;
      if (examples) jsonSchema.examples = [...examples];
    },
  });
  return (json as Json).properties as Json;
}

/** What a case may say of a key: the same, in part, or null. */
function asChange(schema: Json): Json {
  const { title, description, examples, ...rest } = inPart(schema);
  return { title, description, ...(examples ? { examples } : {}), anyOf: [rest, { type: 'null' }] };
}

function inPart(schema: Json): Json {
  const { required: _, ...part } = schema;
  const { properties: keys, anyOf, additionalProperties: others } = part as { [key: string]: unknown };
  return {
    ...part,
    ...(keys ? { properties: mapped(keys as Json, asChange) } : {}),
    ...(Array.isArray(anyOf) ? { anyOf: anyOf.map(inPart) } : {}),
    ...(others && typeof others === 'object' ? { additionalProperties: asChange(others as Json) } : {}),
  };
}

function mapped(record: Json, change: (schema: Json) => Json): Json {
  return Object.fromEntries(Object.entries(record).map(([key, value]) => [key, change(value as Json)]));
}
