// What a row of the unit catalogue says.
//
// 1. A row is data: one symbol, one exact factor, one source. Rows with prefixes stand for all their prefixed forms.
// 2. `factor` leads to the coherent SI unit, as read by exactOfText: "0.45359237*9.80665", "pi/180".
// 3. A spelling belongs to one row only, prefixed forms included (tested).
// Not here: looking units up (catalogue.ts).

export interface UnitRow {
  /** As printed. */
  readonly symbol: string;
  /** What else is read as this unit. */
  readonly spellings?: readonly string[];
  /** In words, singular; proposals are found by it too. */
  readonly name: string;
  /** Key of the dimension: "L M T-2". */
  readonly dimension: string;
  readonly factor: string;
  readonly source: string;
  /** Prefixes that it takes, separated by spaces; "all" for the twenty-four of the SI. */
  readonly prefixes?: string;
  /** The prefixed forms that are worth proposing. */
  readonly usual?: string;
  /** What it counts; see Counts in unit.ts. */
  readonly counts?: 'r' | 'hz' | 'rad';
  /** Standing alone it is a reading: kelvin at the zero of its scale. */
  readonly reading?: string;
  /** Its kind where the dimension does not tell. */
  readonly kind?: 'energy';
}

export interface Prefix {
  readonly symbol: string;
  readonly spellings?: readonly string[];
  readonly name: string;
  readonly power: number;
}

/** SI Brochure 9th ed., Table 7; ronna, quetta, ronto, quecto: 27th CGPM (2022), Resolution 3. */
export const prefixes: readonly Prefix[] = [
  { symbol: 'da', name: 'deca', power: 1 },
  { symbol: 'h', name: 'hecto', power: 2 },
  { symbol: 'k', name: 'kilo', power: 3 },
  { symbol: 'M', name: 'mega', power: 6 },
  { symbol: 'G', name: 'giga', power: 9 },
  { symbol: 'T', name: 'tera', power: 12 },
  { symbol: 'P', name: 'peta', power: 15 },
  { symbol: 'E', name: 'exa', power: 18 },
  { symbol: 'Z', name: 'zetta', power: 21 },
  { symbol: 'Y', name: 'yotta', power: 24 },
  { symbol: 'R', name: 'ronna', power: 27 },
  { symbol: 'Q', name: 'quetta', power: 30 },
  { symbol: 'd', name: 'deci', power: -1 },
  { symbol: 'c', name: 'centi', power: -2 },
  { symbol: 'm', name: 'milli', power: -3 },
  { symbol: 'µ', spellings: ['μ', 'u'], name: 'micro', power: -6 },
  { symbol: 'n', name: 'nano', power: -9 },
  { symbol: 'p', name: 'pico', power: -12 },
  { symbol: 'f', name: 'femto', power: -15 },
  { symbol: 'a', name: 'atto', power: -18 },
  { symbol: 'z', name: 'zepto', power: -21 },
  { symbol: 'y', name: 'yocto', power: -24 },
  { symbol: 'r', name: 'ronto', power: -27 },
  { symbol: 'q', name: 'quecto', power: -30 },
];
