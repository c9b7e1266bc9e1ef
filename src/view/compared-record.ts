// The record of the sheet on the desk, beside the template that the sheet came from once that has been looked for.
//
// 1. Until then nothing is said of it; a template that is not there is said not to be at hand.
// 2. A sheet that is of another template is not compared with this one.
// Not here: the comparison (src/sheet), where the template is found (template/find.ts).

import { type MakeRecord, recordMaker } from '../record/index.ts';
import { compareWithTemplate, type Sheet } from '../sheet/index.ts';

/** `changed` is called when the record has to be made anew. */
export function comparedRecord(changed: () => void): {
  readonly makeRecord: MakeRecord;
  compareWith(template: Sheet | null): void;
} {
  const make = recordMaker();
  /** Undefined until it has been looked for. */
  let template: Sheet | null | undefined;
  return {
    makeRecord(calculation, options) {
      const { sheet } = calculation;
      if (template === undefined) return { ...make(calculation, options), beside: null };
      if (template === null || sheet.template?.id !== template.templateInfo?.id) return make(calculation, options);
      return make(calculation, { ...options, template: compareWithTemplate(sheet, template) });
    },
    compareWith(next) {
      if (next === template) return;
      template = next;
      changed();
    },
  };
}
