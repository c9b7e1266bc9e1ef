// The templates of brakes pass the harness.
//
// Not here: the other templates (files beside).

import { templateIds, testTemplates } from './harness.ts';

testTemplates(templateIds.filter((id) => /brake|block/.test(id)));
