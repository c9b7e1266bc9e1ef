// The templates of ropes, conveyors, ducts and rolls, and all others that no file beside takes, pass the harness.
//
// Not here: belt drives (drives.test.ts), brakes (brakes.test.ts).

import { templateIds, testTemplates } from './harness.ts';

testTemplates(templateIds.filter((id) => !/belt|pulleys|span|brake|block/.test(id)));
