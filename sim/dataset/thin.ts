/** A Dataset with fewer rows in time, for a page that shows fields as maps: the files beside it keep every row. */
import type { Dataset, Variable } from './dataset.ts';

/** Rows of `time` such that its largest field has no more numbers than `most`: every k-th, from the first. */
export function rowStride({ variables }: Dataset, most: number): number {
  const fields = Object.values(variables).filter(({ dims }) => dims[0] === 'time' && dims.length > 1);
  return Math.max(1, ...fields.map(({ data }) => Math.ceil(data.length / most)));
}

/** Keeps every `stride`-th row of `time`; a row's weight is then that of the rows it stands for. */
export function everyRow(dataset: Dataset, stride: number): Dataset {
  if (stride === 1) return dataset;
  const entries = Object.entries(dataset.variables).map(([name, variable]): [string, Variable] => {
    if (variable.dims[0] !== 'time') return [name, variable];
    return [name, name === 'weight' ? summed(variable, stride) : kept(variable, stride)];
  });
  return { variables: Object.fromEntries(entries) };
}

function kept(variable: Variable, stride: number): Variable {
  const [rows, ...rest] = variable.shape;
  const width = rest.reduce((product, length) => product * length, 1);
  const count = Math.ceil(rows / stride);
  const data = new Float64Array(count * width);
  for (let row = 0; row < count; row++) {
    const from = row * stride * width;
    data.set(variable.data.subarray(from, from + width), row * width);
  }
  return { ...variable, data, shape: [count, ...rest] };
}

function summed(variable: Variable, stride: number): Variable {
  const data = new Float64Array(Math.ceil(variable.data.length / stride));
  for (let i = 0; i < variable.data.length; i++) data[Math.floor(i / stride)] += variable.data[i];
  return { ...variable, data, shape: [data.length] };
}
