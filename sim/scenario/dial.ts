/** A number that a reader may move, as plain data. */

export const dialGroups = ['Star', 'Orbit', 'Surface', 'Heat store', 'Rotation'] as const;
export type DialGroup = (typeof dialGroups)[number];

export interface Dial {
  /** Dotted key, as in `CaseInput`. */
  readonly key: string;
  readonly group: DialGroup;
  readonly label: string;
  readonly description: string;
  /** In which it is shown: the one that was typed. */
  readonly unit: string;
  /** As the case has it: the text of the file, and SI. */
  readonly text: string;
  readonly value: number;
  /** SI; the value lies within. */
  readonly low: number;
  readonly high: number;
  /** The range spans decades: equal steps are equal ratios. */
  readonly log: boolean;
  /** Both ends are the same place: an angle that comes round. */
  readonly turns: boolean;
}
