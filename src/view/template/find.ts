// The templates at hand: those that come with the page, and the own ones of this browser; found by id and version.
//
// 1. The built-in ones lie in the piece of the page that the shelf has: they are there once.
// 2. An own template that cannot be read is left out here; the shelf shows it.
// Not here: what is done with them (block.ts, compare.ts).

import { readSheet, type Sheet, type TemplateOrigin } from '../../sheet/index.ts';
import type { House } from '../session.ts';

export interface Group {
  readonly title: string;
  readonly templates: readonly Sheet[];
}

/** Built-in templates by kind of job, own ones at the end. */
export async function templateGroups(house: House | null): Promise<readonly Group[]> {
  const { kindsFound } = await import('../shelf/built-in.ts');
  const own = await ownTemplates(house);
  const groups = kindsFound('').map(({ title, templates }) => ({ title, templates: templates.map(({ sheet }) => sheet) }));
  return own.length === 0 ? groups : [...groups, { title: 'Own templates', templates: own }];
}

async function ownTemplates(house: House | null): Promise<readonly Sheet[]> {
  // Without a store there are no own ones.
  const rows = (await house?.shelf.templates().catch(() => [])) ?? [];
  return rows.flatMap(({ text }) => {
    const read = readSheet(text);
    return read.ok && read.value.templateInfo !== undefined ? [read.value] : [];
  });
}

/**
 * The template that a sheet was made from: of the version if it is at hand, else another of the same id. Own and built-in ones may share
 * an id: the version decides, then the own one.
 */
export async function templateOf(origin: TemplateOrigin, house: House | null): Promise<Sheet | null> {
  const { builtIns } = await import('../shelf/built-in.ts');
  const own = (await ownTemplates(house)).filter((sheet) => sheet.templateInfo?.id === origin.id);
  const built = builtIns().get(origin.id)?.sheet;
  const all = [...own, ...(built === undefined ? [] : [built])];
  return all.find((sheet) => sheet.templateInfo?.version === origin.version) ?? all[0] ?? null;
}
