// What an HTML record carries along, loaded when one is made: the page and the command line start without it.

import type { RecordAssets } from './html-style.ts';

export async function loadRecordAssets(): Promise<RecordAssets> {
  return (await import('./assets.ts')).recordAssets;
}
