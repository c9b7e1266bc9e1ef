// The templates that come with the page, by kind of job, and how they are found by the words of the trade.
//
// 1. They lie in this piece of the page as text and are read when they are first looked at; nothing is asked of the network for them.
// 2. Every file of templates/ is offered: one that no kind of job names stands under the last heading.
// Not here: own templates (src/store), how they are listed (template-list.ts).

import { readSheet, type Sheet, type TemplateInfo } from '../../sheet/index.ts';

export interface BuiltIn {
  readonly id: string;
  readonly sheet: Sheet;
  readonly info: TemplateInfo;
  /** What a search looks in, in lower case. */
  readonly words: string;
}
export interface Kind {
  readonly title: string;
  readonly templates: readonly BuiltIn[];
}

const texts = import.meta.glob<string>('../../../templates/*.sheet.json', { query: '?raw', import: 'default', eager: true });

/** Ids by kind of job. */
const kindsOfJob: readonly (readonly [title: string, ids: readonly string[]])[] = [
  ['Belt drives', ['flat-belt-open', 'flat-belt-crossed', 'flat-belt-idler', 'v-belt']],
  ['Belt paths, installed tension, creep', ['three-pulleys', 'span-frequency', 'span-deflection', 'belt-creep']],
  ['Band brakes', ['band-brake-simple', 'band-brake-differential', 'band-brake-two-way', 'band-and-block', 'brake-stop-heat']],
  ['Ropes, capstans, lifts', ['capstan', 'drum-dead-turns', 'traction-sheave']],
  ['Conveyors, webs, cables', ['conveyor-pulley', 'guide-rolls', 'duct-pull']],
  ['Friction tests', ['wrap-friction-test']],
];
const otherJobs = 'Other jobs';

/** What else the trade calls it, where the sheet itself does not say so. */
const alsoCalled: ReadonlyMap<string, string> = new Map([
  ['flat-belt-open', 'leather rubber polyamide belting transmission shafting pulley drive'],
  ['flat-belt-crossed', 'twisted reversed leather belting transmission shafting'],
  ['flat-belt-idler', 'jockey pulley tensioner tension roller snub'],
  ['v-belt', 'vee wedge belt sheave groove rope drive v-flat'],
  ['three-pulleys', 'serpentine multi pulley belt length path geometry'],
  ['span-frequency', 'tension meter vibration natural frequency plucked strand hertz'],
  ['span-deflection', 'force deflection test spring scale belt tensioning'],
  ['belt-creep', 'slip speed loss elongation ratio'],
  ['band-brake-simple', 'strap brake winch brake hoist backstop'],
  ['band-brake-differential', 'strap brake self-energizing self-locking backstop holdback'],
  ['band-brake-two-way', 'strap brake reversible both directions'],
  ['band-and-block', 'block band brake wooden blocks shoes'],
  ['brake-stop-heat', 'thermal braking energy temperature inertia kinetic'],
  ['capstan', 'bollard bitts winch head windlass belay rope mooring Eytelwein turns'],
  ['drum-dead-turns', 'rope drum hoist crane clamp anchorage safety turns'],
  ['traction-sheave', 'elevator lift koepe hoist groove undercut counterweight'],
  ['conveyor-pulley', 'belt conveyor head drum lagging take-up slip'],
  ['guide-rolls', 'bridle s-roll web strip tension rolls'],
  ['duct-pull', 'conduit cable pulling sidewall pressure bends'],
  ['wrap-friction-test', 'tribology coefficient measurement uncertainty yarn'],
]);

let all: ReadonlyMap<string, BuiltIn> | undefined;

/** By id. */
export function builtIns(): ReadonlyMap<string, BuiltIn> {
  all ??= new Map(Object.entries(texts).map(([file, text]) => builtIn(file, text)));
  return all;
}

function builtIn(file: string, text: string): [string, BuiltIn] {
  const read = readSheet(text);
  // They are part of the product and tested: one that cannot be read is a fault of ours.
  if (!read.ok || read.value.templateInfo === undefined) throw new Error(`${file} is no template`);
  const sheet = read.value;
  const info = sheet.templateInfo!;
  return [info.id, { id: info.id, sheet, info, words: wordsOf(sheet, info, alsoCalled.get(info.id) ?? '') }];
}

/** What a template can be found by: its own words, the names and titles of its lines, what else the trade calls it. */
export function wordsOf(sheet: Sheet, info: TemplateInfo, also = ''): string {
  const lines = sheet.cells.flatMap((cell) => {
    if (cell.kind === 'heading') return [cell.text];
    if (cell.kind === 'given' || cell.kind === 'derived' || cell.kind === 'sought') return [cell.name, cell.title ?? ''];
    return cell.kind === 'criterion' || cell.kind === 'table' ? [cell.title ?? ''] : [];
  });
  const { title, purpose = '', method = '' } = sheet;
  return [info.id, title, info.job, ...info.limits, purpose, method, also, ...lines].join(' ').toLocaleLowerCase();
}

export const searchWords = (text: string): readonly string[] => text.toLocaleLowerCase().split(/\s+/u).filter(Boolean);
export const isFound = (text: string, words: readonly string[]): boolean => words.every((word) => text.includes(word));

/** The kinds of job that hold something of the search, in the order of the shelf. */
export function kindsFound(search: string): readonly Kind[] {
  const words = searchWords(search);
  const known = builtIns();
  const named = new Set(kindsOfJob.flatMap(([, ids]) => ids));
  const rest = [...known.keys()].filter((id) => !named.has(id));
  return [...kindsOfJob, [otherJobs, rest] as const].flatMap(([title, ids]) => {
    const templates = ids.flatMap((id) => known.get(id) ?? []);
    // The name of the kind finds all of it.
    const here = templates.filter((one) => isFound(`${title.toLocaleLowerCase()} ${one.words}`, words));
    return here.length === 0 ? [] : [{ title, templates: here }];
  });
}
