// The set of built-in templates is the published one.
//
// Not here: what each template must be (harness.ts).

import { expect, test } from 'vitest';
import { templateIds } from './harness.ts';
import { publishedNames } from './names.ts';

test('every published template is there, and no other', () => {
  expect([...templateIds].sort()).toEqual([...publishedNames.keys()].sort());
});
