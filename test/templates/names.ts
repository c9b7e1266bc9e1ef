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
  [
    'flat-belt-idler',
    {
      givens: `${flatBelt.givens} x_I y_I d_I`,
      results: `${flatBelt.results} theta_I F_WI`,
      further: 'i_gov theta_0 F_W2 F_W02 F_WI0',
    },
  ],
  [
    'v-belt',
    {
      givens: 'P K_A n_1 s_n d_1 d_2 C mu_1 mu_2 alpha_1 alpha_2 m F_allow z F_0 S_req',
      results: 'mu_e1 mu_e2 theta_1 theta_2 L v F_c F_u F_2lim P_1 F_1 F_2 F_0req k z_req S_slip F_W F_W0',
      further: 'n_2 i_gov psi_W F_W0new',
    },
  ],
  [
    'band-brake-simple',
    {
      givens: 'D theta mu F l a w w_b t p_allow sigma_allow M_req',
      results: 'k F_slack F_tight M F_req F_tight_rev F_slack_rev M_rev F_req_rev p_max sigma',
      further: 'w_req',
    },
  ],
  [
    'band-brake-differential',
    {
      givens: 'D theta mu F l a_slack a_tight w w_b t p_allow sigma_allow M_req',
      results: 'k F_slack F_tight M F_tight_rev F_slack_rev M_rev mu_lock F_req F_req_rev p_max sigma',
      further: 'w_req',
    },
  ],
  [
    'band-brake-two-way',
    {
      givens: 'D theta mu F l a w w_b t p_allow sigma_allow M_req',
      results: 'k F_tight F_slack M p_max sigma F_req',
      further: 'w_req',
    },
  ],
  ['band-and-block', { givens: 'D N_b delta mu F_slack', results: 'k F_tight M', further: 'k_band F_slack_req mu_M' }],
  [
    'brake-stop-heat',
    {
      givens: 'J n_start n_end m_load h_drop m_rim c_rim t_stop N_h A_l g',
      results: 'E dT P_mean P_peak q_peak',
      further: 'N_P',
    },
  ],
  ['capstan', { givens: 'F_load F_hand mu N alpha', results: 'theta k F_hold F_haul N_req mu_req' }],
  ['drum-dead-turns', { givens: 'S mu N f', results: 'F_fix', further: 'k N_req' }],
  [
    'conveyor-pulley',
    {
      givens: 'F_U xi mu theta q_B q_G a_0 a_U s H F_r g',
      results: 'F_Umax k F_2slip F_sag_carry F_sag_return F_2 F_1 F_W',
      further: 'i_gov mu_T F_WT',
    },
  ],
  [
    'traction-sheave',
    {
      givens: 'Q K G r q_R H_t v a_b groove beta gamma theta g',
      results: 'f_load f_brake f_stall ratio_load ratio_brake_down ratio_brake_up ratio_stall k_load k_brake k_stall',
      further: 'mu_Lreq mu_Smax',
    },
  ],
  [
    'three-pulleys',
    { givens: 'x_A y_A d_A x_B y_B d_B x_C y_C d_C', results: 'theta_A theta_B theta_C L s_AB s_BC s_CA', further: 'theta_sum' },
  ],
  ['span-frequency', { givens: 'm L_s f', results: 'F_0', further: 'f_set' }],
  ['span-deflection', { givens: 'F_0 L_s q_rel E_A L', results: 'q F_q' }],
  ['wrap-friction-test', { givens: 'F_out F_in theta', results: 'mu u_mu', further: 'mu_lo mu_hi' }],
  ['belt-creep', { givens: 'n_1 d_1 d_2 sigma_1 sigma_2 E', results: 'n_2_ideal n_2 s_creep', further: 'dn_2' }],
  [
    'duct-pull',
    {
      givens: 'w mu L_1 L_2 L_3 L_4 L_5 L_6 theta_1 theta_2 theta_3 theta_4 theta_5 theta_6 R_1 R_2 R_3 R_4 R_5 R_6 F_in',
      results: 'F_s1 F_s2 F_s3 F_s4 F_s5 F_s6 F_out q_max',
      further: 'F_rev',
    },
  ],
  [
    'guide-rolls',
    {
      givens: 'F_in mu theta_1 theta_2 theta_3 theta_4 theta_5 theta_6',
      results: 'F_s1 F_s2 F_s3 F_s4 F_s5 F_s6 F_out k_total',
      further: 'theta_req',
    },
  ],
]);

export const listOf = (names: string | undefined): readonly string[] => (names ?? '').split(' ').filter((name) => name !== '');
