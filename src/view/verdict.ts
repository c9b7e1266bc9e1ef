// How a sheet stands, in one sentence for the voice of the page.
//
// Not here: the states of single lines (row.ts).

import type { RecordModel } from '../record/index.ts';
import { countLines } from './waiting.ts';

export function verdict(model: RecordModel): string {
  const failed = model.summary.filter((one) => one.cases.some((each) => each.met === false)).length;
  const { wrong, waiting } = countLines(model.problems);
  const criteria = failed === 0 ? 'no criterion fails' : `${failed} ${failed === 1 ? 'criterion is' : 'criteria are'} not met`;
  if (wrong.length === 0) return criteria;
  const lines = `${wrong.length} ${wrong.length === 1 ? 'line has an error' : 'lines have errors'}`;
  return waiting === 0 ? `${lines}; ${criteria}` : `${lines}, ${waiting} wait; ${criteria}`;
}
