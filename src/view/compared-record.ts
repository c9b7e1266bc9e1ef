// The record of the sheet on the desk, beside the template that the sheet came from once that is at hand.
//
// 1. A sheet that is made from another template later, or from none, is not compared with this one.
// Not here: the comparison (src/sheet), where the template is found (template/find.ts).

import { type MakeRecord, recordMaker } from '../record/index.ts';
import { compareWithTemplate, type Sheet } from '../sheet/index.ts';

/** `changed` is called when the record has to be made anew. */
export function comparedRecord(changed: () => void): {
  readonly makeRecord: MakeRecord;
  compareWith(template: Sheet): void;
} {
  const make = recordMaker();
  let template: Sheet | null = null;
  return {
    makeRecord(calculation, options) {
      const { sheet } = calculation;
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
