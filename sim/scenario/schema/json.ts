/** The whole scenario file as JSON Schema (draft 7), for editors. From the input side: text and numbers as they are typed. */
import * as z from 'zod';
import { quantityPattern, unitsInWords } from '../../quantity/index.ts';
import { oneStore } from './heatStore.ts';
import type { About } from './leaf.ts';
import { caseSchema, headSchema } from './scenario.ts';
import { emissionSchema } from './surface.ts';

type Json = { [key: string]: unknown };

/** Sections that say one of several things. */
const alone: ReadonlySet<z.core.$ZodType> = new Set([oneStore, emissionSchema]);

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
      const about = z.globalRegistry.get(zodSchema) as About | undefined;
      if (about?.examples) jsonSchema.examples = [...about.examples];
      if (about?.takes) asText(jsonSchema as Json, about.takes);
      for (const ours of ['takes', 'numbers', 'usual', 'cut']) Reflect.deleteProperty(jsonSchema, ours);
      if (alone.has(zodSchema)) Object.assign(jsonSchema, { minProperties: 1, maxProperties: 1 });
    },
  });
  return (json as Json).properties as Json;
}

/** A number with a dimension is text: without its unit it is not understood. Pure numbers stay text or number. */
function asText(schema: Json, takes: NonNullable<About['takes']>): void {
  if (takes !== 'text' && takes.dimension === 'number') return;
  Reflect.deleteProperty(schema, 'anyOf');
  schema.type = 'string';
  if (takes === 'text') return;
  schema.pattern = quantityPattern(takes);
  schema.description = `${schema.description}. Units: ${unitsInWords(takes)}`;
}

/** What a case may say of a key: the same, in part, or null. */
function asChange(schema: Json): Json {
  const { title, description, examples, ...rest } = inPart(schema);
  return { title, description, ...(examples ? { examples } : {}), anyOf: [rest, { type: 'null' }] };
}

function inPart(schema: Json): Json {
  const { required: _required, minProperties: _least, maxProperties: _most, ...part } = schema;
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
