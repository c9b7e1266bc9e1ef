// Reading of formulas: trees, names, and the place of every part in the text as typed.

import { describe, expect, test } from 'vitest';
import type { Expr } from '../../src/formula/index.ts';
import { parseFormula } from '../../src/formula/index.ts';

/** A tree on one line, every node with the text that its span cuts out of the formula. */
function outline(source: string, e: Expr): string {
  const of = (x: Expr): string => outline(source, x);
  const cut = source.slice(...e.at);
  switch (e.kind) {
    case 'number':
      return `${e.text}=${e.value}@${cut}`;
    case 'constant':
    case 'name':
      return `${e.name}@${cut}`;
    case 'quoted':
      return `'${e.text}'@${cut}`;
    case 'parens':
    case 'minus':
    case 'not':
      return `${e.kind}[${of(e.inner)}]@${cut}`;
    case 'binary':
      return `${e.implicit ? 'implicit ' : ''}${e.operator}[${of(e.left)} ${of(e.right)}]@${cut}`;
    case 'logic':
      return `${e.operator}[${of(e.left)} ${of(e.right)}]@${cut}`;
    case 'compare':
      return `${e.operators.join(' ')}[${e.sides.map(of).join(' ')}]@${cut}`;
    case 'choose':
      return `choose[${of(e.test)} ${of(e.then)} ${of(e.otherwise)}]@${cut}`;
    case 'call':
      return `${e.name}[${e.args.map(of).join(' ')}]@${cut}`;
    case 'table':
      return `${e.name}[${e.table} ${e.column} ${of(e.key)}]@${cut}`;
  }
}

function read(text: string): string {
  const formula = parseFormula(text);
  return formula.ok ? outline(text, formula.value.expr) : `${formula.problem.code}: ${formula.problem.message}`;
}

describe('what is read', () => {
  test.each([
    ['a', 'a@a'],
    ['  a  ', 'a@a'],
    [
      'F_c + F_u*k/(k - 1)',
      '+[F_c@F_c /[*[F_u@F_u k@k]@F_u*k parens[-[k@k 1=1@1]@k - 1]@(k - 1)]@F_u*k/(k - 1)]@F_c + F_u*k/(k - 1)',
    ],
    ['-a^2', 'minus[^[a@a 2=2@2]@a^2]@-a^2'],
    ['a^b^c', '^[a@a ^[b@b c@c]@b^c]@a^b^c'],
    ['2 x^2 y', 'implicit *[implicit *[2=2@2 ^[x@x 2=2@2]@x^2]@2 x^2 y@y]@2 x^2 y'],
    ['2(3 + 4)', 'implicit *[2=2@2 parens[+[3=3@3 4=4@4]@3 + 4]@(3 + 4)]@2(3 + 4)'],
    ['(+a)*b', '*[parens[a@a]@(+a) b@b]@(+a)*b'],
    ['a - +b', '-[a@a b@b]@a - +b'],
    ['((a))', 'parens[parens[a@a]@(a)]@((a))'],
    ['max(a, -b, c)', 'max[a@a minus[b@b]@-b c@c]@max(a, -b, c)'],
    ['sin (x)^2', '^[sin[x@x]@sin (x) 2=2@2]@sin (x)^2'],
    ['sqrt(2)(1 + 2)', 'implicit *[sqrt[2=2@2]@sqrt(2) parens[+[1=1@1 2=2@2]@1 + 2]@(1 + 2)]@sqrt(2)(1 + 2)'],
    [
      'a < b and not (c >= d)',
      'and[<[a@a b@b]@a < b not[parens[>=[c@c d@d]@c >= d]@(c >= d)]@not (c >= d)]@a < b and not (c >= d)',
    ],
    ['0 <= a < 1', '<= <[0=0@0 a@a 1=1@1]@0 <= a < 1'],
    ['s == "leather" ? 1 : 2', `choose[==[s@s 'leather'@"leather"]@s == "leather" 1=1@1 2=2@2]@s == "leather" ? 1 : 2`],
    ['a ? b : c ? d : x', 'choose[a@a b@b choose[c@c d@d x@x]@c ? d : x]@a ? b : c ? d : x'],
    ['a ?.5 : b', 'choose[a@a .5=0.5@.5 b@b]@a ?.5 : b'],
    [
      'mu_0/(1 + v/"10 m/s")',
      `/[mu_0@mu_0 parens[+[1=1@1 /[v@v '10 m/s'@"10 m/s"]@v/"10 m/s"]@1 + v/"10 m/s"]@(1 + v/"10 m/s")]@mu_0/(1 + v/"10 m/s")`,
    ],
    ['2*pi*n', '*[*[2=2@2 pi@pi]@2*pi n@n]@2*pi*n'],
    ['e^(mu*theta)', '^[e@e parens[*[mu@mu theta@theta]@mu*theta]@(mu*theta)]@e^(mu*theta)'],
    ['interpolate(friction, mu_dry, v)', 'interpolate[friction mu_dry v@v]@interpolate(friction, mu_dry, v)'],
    ['entry(bolts, max, "M12")*2', `*[entry[bolts max 'M12'@"M12"]@entry(bolts, max, "M12") 2=2@2]@entry(bolts, max, "M12")*2`],
    [
      '1.20 + 5. + 1e3 + 2.5E-7',
      '+[+[+[1.20=1.2@1.20 5.=5@5.]@1.20 + 5. 1e3=1000@1e3]@1.20 + 5. + 1e3 2.5E-7=2.5e-7@2.5E-7]@1.20 + 5. + 1e3 + 2.5E-7',
    ],
    ['a +\n  b', '+[a@a b@b]@a +\n  b'],
    ['constructor*i', '*[constructor@constructor i@i]@constructor*i'],
  ])('%j', (text, expected) => {
    expect(read(text)).toBe(expected);
  });
});

describe('what is typed as on paper means the same', () => {
  test.each([
    ['μ·θ₁', 'mu*theta_1', ['μ', 'θ₁']],
    ['µ×θ_1', 'mu*theta_1', ['µ', 'θ_1']],
    ['F₁min − F₂min', 'F_1min-F_2min', ['F₁min', 'F₂min']],
    ['π÷2', 'pi/2', ['π', '2']],
    ['ρ·b·t·v²', 'rho*b*t*v^2', ['ρ', 'b', 't', 'v', '²']],
    ['x⁻¹²', 'x^-12', ['x', '¹²']],
    ['a ≤ b', 'a<=b', ['a', 'b']],
    ['a ≠ b', 'a!=b', ['a', 'b']],
    ['“10 m/s”·v', '"10 m/s"*v', ['“10 m/s”', 'v']],
    ['ΔT\u00a0+\u2009Å', 'DeltaT+Å', ['ΔT', 'Å']],
    ['e\u0301 + 2', 'é+2', ['e\u0301', '2']],
  ])('%j is read as %j, each leaf where it was typed', (typed, plain, leaves) => {
    const one = parseFormula(typed);
    const two = parseFormula(plain);
    if (!one.ok || !two.ok) throw new Error(JSON.stringify([one, two]));
    const shape = (e: unknown): unknown => JSON.parse(JSON.stringify(e, (key, value) => (key === 'at' ? undefined : value)));
    expect(shape(one.value.expr)).toEqual(shape(two.value.expr));
    const found: string[] = [];
    const visit = (value: unknown): void => {
      if (typeof value !== 'object' || value === null) return;
      const node = value as { kind?: string; at?: [number, number] };
      if (node.at && /^(?:name|number|constant|quoted)$/.test(node.kind ?? '')) found.push(typed.slice(...node.at));
      else for (const part of Object.values(value)) visit(part);
    };
    visit(one.value.expr);
    expect(found).toEqual(leaves);
  });
});

describe('names of a formula', () => {
  test('each once, in the order of the text, canonical; constants, functions and table words are none', () => {
    const formula = parseFormula('b*θ_1 + sin(a)*b/pi + entry(t, col, key) + μ*e^2');
    expect(formula.ok && formula.value.names).toEqual(['b', 'theta_1', 'a', 'key', 'mu']);
    expect(formula.ok && formula.value.tables).toEqual(['t']);
  });

  test('the text of a formula is kept as typed', () => {
    const formula = parseFormula(' μ ·x ');
    expect(formula.ok && formula.value.text).toBe(' μ ·x ');
  });
});
