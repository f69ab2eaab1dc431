/** `series.csv`: temperature and what drives it through the orbit; tidy, one instant of one state of one case a row. */
import { metresPerAu, radiansPerDegree } from '../../sim/constants.ts';
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { timeSeriesVariables } from '../../sim/dataset/names.ts';
import { view } from '../../sim/dataset/view.ts';
import type { RunResult } from '../../sim/run.ts';
import { csvField, csvNumber } from './csv.ts';

interface Column {
  readonly header: string;
  readonly variable: (typeof timeSeriesVariables)[number];
  /** SI per unit of the column. */
  readonly unit: number;
}

const columns: readonly Column[] = [
  { header: 'time_s', variable: 'time', unit: 1 },
  { header: 'weight', variable: 'weight', unit: 1 },
  { header: 'mean_anomaly_deg', variable: 'meanAnomaly', unit: radiansPerDegree },
  { header: 'true_anomaly_deg', variable: 'trueAnomaly', unit: radiansPerDegree },
  { header: 'distance_au', variable: 'distance', unit: metresPerAu },
  { header: 'instellation_W_m2', variable: 'instellation', unit: 1 },
  { header: 'absorbed_W_m2', variable: 'absorbed', unit: 1 },
  { header: 'emitted_W_m2', variable: 'emitted', unit: 1 },
  { header: 'temperature_K', variable: 'temperature', unit: 1 },
  { header: 'steady_temperature_K', variable: 'steadyTemperature', unit: 1 },
];

/** The file as text. Errors: throws when a number in it is not finite. */
export function seriesText(result: RunResult): string {
  const header = ['case', 'state', ...columns.map((column) => column.header)].join(',');
  const blocks = result.cases.flatMap(({ name, states }) =>
    states.map((state) => rowsOf(`${csvField(name)},${csvField(state.label)}`, state.dataset)),
  );
  return `${[header, ...blocks.flat()].join('\n')}\n`;
}

function rowsOf(head: string, dataset: Dataset): string[] {
  const views = columns.map(({ header, variable, unit }) => ({
    header,
    unit,
    values: view(dataset.variables[variable]!),
  }));
  return Array.from({ length: views[0]!.values.shape[0]! }, (_, row) => {
    const fields = views.map(({ header, unit, values }) => csvNumber(values.get(row) / unit, header));
    return `${head},${fields.join(',')}`;
  });
}
