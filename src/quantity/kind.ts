// Kinds of quantity in words, for messages: "a force (N)", "a torque (N·m)", "an area (mm²)".
//
// 1. The dimension gives the kind; where it leaves two (torque and energy, a rate and a rotational frequency), the unit as
//    written decides, and without one both are named.
// 2. Terms are those of ISO 80000-3 and ISO 80000-4; "number" stands for a quantity of dimension one.
// Not here: whether two kinds may meet in a formula.

import { symbolOfText } from './catalogue.ts';
import { coherentUnit } from './coherent.ts';
import type { Dimension } from './dimension.ts';
import { dimensionKey, dimensionOf, equalD } from './dimension.ts';
import type { Unit } from './unit.ts';
import { readUnit } from './unit-text.ts';

const words: ReadonlyMap<string, string> = new Map(
  (
    [
      ['1', 'number'],
      ['L', 'length'],
      ['L2', 'area'],
      ['L3', 'volume'],
      ['L4', 'second moment of area'],
      ['L-1', 'reciprocal length'],
      ['M', 'mass'],
      ['L-1 M', 'mass per length'],
      ['L-2 M', 'mass per area'],
      ['L-3 M', 'density'],
      ['L2 M', 'moment of inertia'],
      ['L M', 'mass times length'],
      ['T', 'time'],
      ['T-1', 'rate'],
      ['L T-1', 'speed'],
      ['L T-2', 'acceleration'],
      ['L2 T-2', 'speed squared or energy per mass'],
      ['L3 T-1', 'volume flow rate'],
      ['M T-1', 'mass flow rate'],
      ['L2 T-1', 'kinematic viscosity'],
      ['L-1 M T-1', 'dynamic viscosity'],
      ['L M T-2', 'force'],
      ['M T-2', 'force per length'],
      ['L-1 M T-2', 'stress or pressure'],
      ['L-2 M T-2', 'force per volume'],
      ['L2 M T-2', 'torque or energy'],
      ['L M T-1', 'momentum'],
      ['L2 M T-1', 'angular momentum'],
      ['L2 M T-3', 'power'],
      ['M T-3', 'power per area'],
      ['L3 M T-2', 'flexural rigidity'],
      ['Θ', 'temperature'],
      ['Θ-1', 'coefficient of thermal expansion'],
      ['L2 T-2 Θ-1', 'specific heat capacity'],
      ['L2 M T-2 Θ-1', 'heat capacity'],
      ['L M T-3 Θ-1', 'thermal conductivity'],
      ['M T-3 Θ-1', 'coefficient of heat transfer'],
      ['I', 'electric current'],
      ['T I', 'electric charge'],
      ['L2 M T-3 I-1', 'electric potential'],
      ['L2 M T-3 I-2', 'electric resistance'],
      ['N', 'amount of substance'],
      ['J', 'luminous intensity'],
    ] as const
  ).map(([key, word]) => [dimensionKey(dimensionOf(key)), word]),
);

const torque = dimensionOf('L2 M T-2');
const rate = dimensionOf('T-1');
const holdsEnergy = (symbol: string): boolean => symbolOfText(symbol)?.row.kind === 'energy';

/** What the counts and symbols of a unit say beyond its dimension. */
function kindByUnit(unit: Unit): string | undefined {
  const { counts, dimension, parts, text } = unit;
  if (equalD(dimension, torque)) {
    // N·m and lbf·ft are read as torque; W·h, J and Btu as energy.
    if (parts.some(({ symbol }) => holdsEnergy(symbol))) return counts.r.n === 0 ? 'energy' : 'energy per revolution';
    if (parts.some(({ symbol }) => symbol === 'h' || symbol.endsWith('W'))) return 'energy';
    return parts.length === 2 && counts.r.n === 0 ? 'torque' : undefined;
  }
  const { r, hz, rad } = counts;
  if (equalD(dimension, rate)) {
    if (r.n === 1 && r.d === 1) return 'rotational frequency';
    if (hz.n === 1 && hz.d === 1) return 'frequency';
    if (rad.n === 1 && rad.d === 1) return 'angular velocity';
    return undefined;
  }
  const key = dimensionKey(dimension);
  if (key === '1') {
    if (r.n !== 0) return r.n === 1 && r.d === 1 ? 'number of revolutions' : undefined;
    if (rad.n === 1 && rad.d === 1) return 'angle';
    return undefined;
  }
  if (key === 'T-2' && rad.n === 1) return 'angular acceleration';
  if (r.n === -1 && r.d === 1) return `${words.get(key) ?? `quantity of unit ${text}`} per revolution`;
  return undefined;
}

/** The kind in words, without article: 'force', 'torque', 'number', 'quantity of unit kg²·m'. */
export function kindName(dimension: Dimension, unitText?: string): string {
  const unit = unitText === undefined ? undefined : readUnit(unitText);
  const read = unit?.ok === true && equalD(unit.value.dimension, dimension) ? unit.value : undefined;
  const special = read && kindByUnit(read);
  return special ?? words.get(dimensionKey(dimension)) ?? `quantity of unit ${read?.text ?? coherentUnit(dimension).text}`;
}

/** "a force", "an area"; of a unit what describeUnit says. */
export function withArticle(what: string | Unit): string {
  if (typeof what !== 'string') return describeUnit(what);
  return `${/^[aeio]/.test(what) ? 'an' : 'a'} ${what}`;
}

/** "a force (N)", "a number", "a temperature (°C)". */
export function describeUnit(unit: Unit): string {
  const kind = kindName(unit.dimension, unit.text);
  return unit.text === '1' || kind.endsWith(unit.text) ? withArticle(kind) : `${withArticle(kind)} (${unit.text})`;
}

/** Where a unit with lb, oz or kg misses a dimension by exactly the acceleration of free fall: what to write for the force. */
export function forceHint(unit: Unit, wanted: Dimension): string | undefined {
  const forces = new Map([
    ['lb', 'lbf'],
    ['oz', 'ozf'],
    ['kg', 'kgf'],
  ]);
  const mass = unit.parts.find(({ symbol }) => forces.has(symbol));
  const force = mass && forces.get(mass.symbol);
  if (!mass || force === undefined) return undefined;
  const asForce = readUnit(unit.text.replace(new RegExp(`(?<![\\p{L}])${mass.symbol}(?![\\p{L}_])`, 'u'), force));
  if (!asForce.ok || !equalD(asForce.value.dimension, wanted)) return undefined;
  return `${mass.symbol} is a unit of mass; the force is ${force}: write ${asForce.value.text}`;
}
