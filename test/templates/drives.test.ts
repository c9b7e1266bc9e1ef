// The templates of belt drives pass the harness.
//
// Not here: the other templates (files beside).

import { templateIds, testTemplates } from './harness.ts';

testTemplates(templateIds.filter((id) => /belt|pulleys|span/.test(id)));
