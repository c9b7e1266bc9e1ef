// The data file of GNU units, evaluated exactly: what the program itself rounds at every step stays a rational number here.
//
// 1. Read is the file that the installed program names (`units --unitsfile`), in UTF-8, for the locale en_US.
// 2. Its grammar as far as our units need it: juxtaposition and * bind closer than /, | closer still, ^ or a last digit is a power.
// 3. Shares nothing with the code under test: own numbers, own reader.
// Not here: the comparison (gnu-units.test.ts).

import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';

export interface Amount {
  readonly n: bigint;
  readonly d: bigint;
  /** Exponents of the program's primitive units, by name; dimensionless ones left out. */
  readonly base: ReadonlyMap<string, number>;
}

const number = (n: bigint, d = 1n): Amount => ({ n, d, base: new Map() });

function times(a: Amount, b: Amount, sign: 1 | -1): Amount {
  const base = new Map(a.base);
  for (const [unit, exponent] of b.base) {
    const sum = (base.get(unit) ?? 0) + sign * exponent;
    if (sum === 0) base.delete(unit);
    else base.set(unit, sum);
  }
  return sign === 1 ? { n: a.n * b.n, d: a.d * b.d, base } : { n: a.n * b.d, d: a.d * b.n, base };
}

function raise(a: Amount, exponent: number): Amount {
  let result = number(1n);
  for (let i = 0; i < Math.abs(exponent); i++) result = times(result, a, exponent > 0 ? 1 : -1);
  return result;
}

/** Runs the program; a missing one is a failure with a sentence, never a skipped test. */
export function runUnits(args: readonly string[], input = ''): string {
  const run = spawnSync('units', args, {
    input,
    encoding: 'utf8',
    env: { PATH: process.env['PATH'] ?? '', LC_ALL: 'C.UTF-8', UNITS_SYSTEM: 'default' },
    maxBuffer: 1 << 26,
  });
  if (run.error) throw new Error(`GNU units is needed for this check (Debian package "units"): ${run.error.message}`);
  return run.stdout;
}

export class Definitions {
  readonly #units = new Map<string, string>();
  readonly #prefixes = new Map<string, string>();
  readonly #known = new Map<string, Amount>();

  constructor() {
    const file = runUnits(['--unitsfile']).trim().split('\n').pop() ?? '';
    let skipping = false;
    for (const raw of readFileSync(file, 'utf8').replaceAll('\\\n', ' ').split('\n')) {
      const line = raw.replace(/#.*/, '').trim();
      if (/^!(?:locale|var|varnot)\b/.test(line)) skipping = !/^!locale en_US|^!varnot|^!var UNITS_ENGLISH US/.test(line);
      else if (/^!end(?:locale|var)/.test(line)) skipping = false;
      if (line === '' || line.startsWith('!') || skipping) continue;
      const [name = '', ...rest] = line.split(/\s+/);
      if (name.includes('(') || name.includes('[') || rest.length === 0) continue;
      const target = name.endsWith('-') ? this.#prefixes : this.#units;
      target.set(name.replace(/-$/, ''), rest.join(' '));
    }
  }

  /** The exact amount of an expression. Throws for what is not understood. */
  amount(expression: string): Amount {
    const words = expression.match(/[\d.]+(?:[eE][+-]?\d+)?|[^\s\d.()*/|^+-][^\s()*/|^+-]*|[()*/|^+-]/g) ?? [];
    let next = 0;
    const peek = (): string => words[next] ?? '';
    const quotient = (): Amount => {
      let value = peek() === '/' ? number(1n) : product();
      while (peek() === '/') {
        next++;
        value = times(value, product(), -1);
      }
      return value;
    };
    const product = (): Amount => {
      let value = power();
      while (peek() !== '' && !/^[)/+|-]$/.test(peek())) {
        if (peek() === '*') next++;
        value = times(value, power(), 1);
      }
      return value;
    };
    const power = (): Amount => {
      const value = primary();
      if (peek() !== '^') return value;
      next++;
      const text = words.slice(next).join('');
      const match = /^(?:\((-?\d+)\)|(-?\d+))/.exec(text);
      if (!match) throw new Error(`exponent not understood: ${expression}`);
      for (let left = match[0].length; left > 0; next++) left -= peek().length;
      return raise(value, Number(match[1] ?? match[2]));
    };
    const primary = (): Amount => {
      const word = words[next++] ?? '';
      if (word === '(') {
        const value = quotient();
        if (words[next++] !== ')') throw new Error(`parenthesis not closed: ${expression}`);
        return value;
      }
      if (!/^[\d.]/.test(word)) return this.#unit(word);
      const value = decimal(word);
      if (peek() !== '|') return value;
      next++;
      return times(value, decimal(words[next++] ?? ''), -1);
    };
    const value = quotient();
    if (next < words.length) throw new Error(`not understood: ${expression} (at ${peek()})`);
    return value;
  }

  #unit(name: string): Amount {
    const known = this.#known.get(name);
    if (known) return known;
    const value = this.#find(name);
    if (!value) throw new Error(`not in the data file of GNU units: ${name}`);
    this.#known.set(name, value);
    return value;
  }

  #find(name: string): Amount | undefined {
    const definition = this.#units.get(name);
    if (definition?.startsWith('!'))
      return { n: 1n, d: 1n, base: definition === '!dimensionless' ? new Map() : new Map([[name, 1]]) };
    if (definition !== undefined) return this.amount(definition);
    const power = /^(.*\D)([2-9])$/.exec(name);
    if (power?.[1] !== undefined) return raise(this.#unit(power[1]), Number(power[2]));
    for (const plural of [/s$/, /es$/]) {
      if (plural.test(name) && this.#units.has(name.replace(plural, ''))) return this.#unit(name.replace(plural, ''));
    }
    for (let cut = name.length; cut >= 1; cut--) {
      const prefix = this.#prefixes.get(name.slice(0, cut));
      if (prefix === undefined) continue;
      const factor = this.amount(prefix);
      return cut === name.length ? factor : times(factor, this.#unit(name.slice(cut)), 1);
    }
    return undefined;
  }
}

function decimal(text: string): Amount {
  const [mantissa = '', exponent = '0'] = text.toLowerCase().split('e');
  const [whole = '', decimals = ''] = mantissa.split('.');
  const places = Number(exponent) - decimals.length;
  const digits = BigInt(`${whole}${decimals}`);
  return places >= 0 ? number(digits * 10n ** BigInt(places)) : number(digits, 10n ** BigInt(-places));
}
