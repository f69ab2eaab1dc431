/** A process of its own for a test: writes 2 MB to the path of its argument and prints the error. */
import { writeNetcdf } from '../../../cli/output/netcdf.ts';

const data = Float64Array.from({ length: 250_000 }, (_, i) => Math.sin(i * i));
const variables = { field: { data, dims: ['x', 'y'], attributes: {} } };
const file = { attributes: {}, dimensions: { x: 500, y: 500 }, variables, groups: {} };
await writeNetcdf(process.argv[2]!, file).catch((error) => process.stdout.write(`${error}\n`));
