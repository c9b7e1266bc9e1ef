// A sheet as large as one asks for: open flat belts one after the other, as a dossier of many drives has them.
//
// 1. A section is 25 cells: heading, note, four givens, sixteen derived quantities, three criteria; two load cases.
// 2. Every belt runs at the speed and under the power of the first two givens, so that most lines follow from each of them.
// Not here: what is measured with it (main.ts, page.ts).

import type { Cell, Sheet } from '../../src/sheet/index.ts';

const perSection = 25;

export function largeSheet(count: number): Sheet {
  const cells: Cell[] = [
    { id: 'head', kind: 'heading', level: 1, text: 'Duty' },
    {
      id: 'n',
      kind: 'given',
      name: 'n',
      title: 'Speed of the motor',
      value: '1450 r/min',
      byCase: { cold: '1380 r/min' },
      source: 'name plate',
    },
    { id: 'P', kind: 'given', name: 'P', title: 'Power', value: '7.5 kW', source: 'name plate' },
  ];
  for (let k = 1; cells.length + perSection <= count; k += 1) cells.push(...section(k));
  for (let k = 1; cells.length < count; k += 1) cells.push(derived(`w_${k}`, 'Speed of rotation', '2*pi/"1 r"*n', 'rad/s'));
  return {
    format: 'tightside-sheet/1',
    title: `Flat belts, ${count} cells`,
    settings: { digits: 4 },
    cases: [
      { id: 'warm', title: 'Warm' },
      { id: 'cold', title: 'Cold start' },
    ],
    cells,
  };
}

const derived = (name: string, title: string, formula: string, unit: string): Cell => ({
  id: name,
  kind: 'derived',
  name,
  title,
  formula,
  unit,
  source: 'common practice',
});

const given = (name: string, title: string, value: string): Cell => ({
  id: name,
  kind: 'given',
  name,
  title,
  value,
  source: 'drawing of the drive',
});

function section(k: number): readonly Cell[] {
  const at = (name: string) => `${name}_${k}`;
  // A little different in each section, so that no formula with its numbers stands twice.
  const size = 160 + k;
  return [
    { id: at('heading'), kind: 'heading', level: 1, text: `Belt ${k}` },
    { id: at('note'), kind: 'note', text: `Open drive ${k}; the belt stands under a pull of {${at('F1')}} on its tight side.` },
    given(at('d'), 'Diameter of the small pulley', `${size} mm`),
    given(at('D'), 'Diameter of the large pulley', `${2 * size + 35} mm`),
    given(at('a'), 'Distance of the shafts', `${900 + 3 * k} mm`),
    given(at('mu'), 'Coefficient of friction', `0.${30 + (k % 20)}`),
    derived(at('i'), 'Ratio of the drive', `D_${k}/d_${k}`, '1'),
    derived(at('v'), 'Speed of the belt', `pi/"1 r"*d_${k}*n`, 'm/s'),
    derived(at('gamma'), 'Half the difference of the angles', `asin((D_${k} - d_${k})/(2*a_${k}))`, 'deg'),
    derived(at('beta'), 'Angle of wrap of the small pulley', `pi - 2*gamma_${k}`, 'deg'),
    derived(at('m'), 'Ratio of the belt pulls', `exp(mu_${k}*beta_${k})`, '1'),
    derived(at('Ft'), 'Tangential force', `P/v_${k}`, 'N'),
    derived(at('F1'), 'Pull of the tight side', `Ft_${k}*m_${k}/(m_${k} - 1)`, 'N'),
    derived(at('F2'), 'Pull of the slack side', `F1_${k} - Ft_${k}`, 'N'),
    derived(at('FW'), 'Load of the shaft', `sqrt(F1_${k}^2 + F2_${k}^2 - 2*F1_${k}*F2_${k}*cos(beta_${k}))`, 'N'),
    derived(
      at('l'),
      'Length of the belt',
      `2*a_${k}*cos(gamma_${k}) + pi/2*(D_${k} + d_${k}) + gamma_${k}*(D_${k} - d_${k})`,
      'mm',
    ),
    derived(at('b'), 'Width of the belt', `F1_${k}/"12 N/mm"`, 'mm'),
    derived(at('A'), 'Section of the belt', `b_${k}*"2.5 mm"`, 'mm^2'),
    derived(at('s'), 'Stress of the tight side', `F1_${k}/A_${k}`, 'N/mm^2'),
    derived(at('fB'), 'Bendings in unit time', `2*v_${k}/l_${k}`, '1/s'),
    derived(at('T'), 'Torque of the small pulley', `Ft_${k}*d_${k}/2`, 'N*m'),
    derived(at('T2'), 'Torque of the large pulley', `T_${k}*i_${k}`, 'N*m'),
    criterion(at('c1'), 'Speed of the belt', `v_${k}`, '"60 m/s"'),
    criterion(at('c2'), 'Bendings', `fB_${k}`, '"25 1/s"'),
    criterion(at('c3'), 'Stress of the tight side', `s_${k}`, '"6 N/mm^2"'),
  ];
}

const criterion = (id: string, title: string, left: string, right: string): Cell => ({
  id,
  kind: 'criterion',
  title,
  left,
  relation: '<=',
  right,
  source: 'common practice',
});
