// The names that outside programs rely on, template by template: givens and results, spelled as they are published.
//
// 1. A template may define more; it may not leave one of these out.
// 2. `further` are final values beyond those: derived cells that nothing else uses and that a reader takes from the sheet.

export interface Names {
  readonly givens: string;
  readonly results: string;
  readonly further?: string;
}

const flatBelt: Names = {
  givens: 'P K_A n_1 s_n d_1 d_2 C mu_1 mu_2 b t rho sigma_allow sigma_tot E_b F_0 S_req',
  results:
    'n_2 v theta_1 theta_2 L L_i m F_c F_u k F_1min F_2min F_1lim F_2lim P_lim b_req v_opt P_0 F_1 F_2 S_slip F_0req sigma_max F_W psi_W F_W0 F_W0new',
  further: 'i_gov',
};

export const publishedNames: ReadonlyMap<string, Names> = new Map<string, Names>([
  ['flat-belt-open', flatBelt],
  ['flat-belt-crossed', flatBelt],
  ['capstan', { givens: 'F_load F_hand mu N alpha', results: 'theta k F_hold F_haul N_req mu_req' }],
]);

export const listOf = (names: string | undefined): readonly string[] => (names ?? '').split(' ').filter((name) => name !== '');
