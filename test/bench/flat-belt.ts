// The formulas of the open flat belt sheet once more, written by hand as one loop: the reference that studies are measured against.
//
// Inputs and outputs are columns in coherent SI, in the order of the two lists. Every intermediate that the sheet keeps is kept here too.

export const inputs = [
  'P',
  'K_A',
  'n_1',
  's_n',
  'd_1',
  'd_2',
  'C',
  'b',
  't',
  'rho',
  'sigma_allow',
  'E_b',
  'mu_1',
  'mu_2',
  'F_0',
  'S_req',
  'f_new',
] as const;

export const outputs = [
  'n_2',
  'v',
  'beta',
  'theta_1',
  'theta_2',
  'L',
  'L_i',
  'm',
  'F_c',
  'k_1',
  'k_2',
  'k',
  'F_u',
  'F_1min',
  'F_2min',
  'F_1lim',
  'F_2lim',
  'P_lim',
  'b_req',
  'v_opt',
  'F_0eff',
  'P_0',
  'S_slip',
  'F_0req',
  'F_1',
  'F_2',
  'sigma_1',
  'sigma_b',
  'sigma_max',
  'F_1eff',
  'F_2eff',
  'F_W',
  'psi_W',
  'F_W0',
  'F_W0new',
] as const;

/** Computes `count` samples: one Float64Array an input, one an output. */
export function flatBelt(input: readonly Float64Array[], output: readonly Float64Array[], count: number): void {
  const [P, K_A, n_1, s_n, d_1, d_2, C, b, t, rho, sigma_allow, E_b, mu_1, mu_2, F_0, S_req, f_new] = input as Float64Array[] & {
    length: 17;
  };
  const [
    o_n_2,
    o_v,
    o_beta,
    o_theta_1,
    o_theta_2,
    o_L,
    o_L_i,
    o_m,
    o_F_c,
    o_k_1,
    o_k_2,
    o_k,
    o_F_u,
    o_F_1min,
    o_F_2min,
    o_F_1lim,
    o_F_2lim,
    o_P_lim,
    o_b_req,
    o_v_opt,
    o_F_0eff,
    o_P_0,
    o_S_slip,
    o_F_0req,
    o_F_1,
    o_F_2,
    o_sigma_1,
    o_sigma_b,
    o_sigma_max,
    o_F_1eff,
    o_F_2eff,
    o_F_W,
    o_psi_W,
    o_F_W0,
    o_F_W0new,
  ] = output as Float64Array[] & { length: 35 };
  for (let i = 0; i < count; i += 1) {
    const d1 = d_1![i]!;
    const d2 = d_2![i]!;
    const c = C![i]!;
    const width = b![i]!;
    const thick = t![i]!;
    const duty = K_A![i]! * P![i]!;
    o_n_2![i] = (n_1![i]! * d1) / d2;
    const v = Math.PI * d1 * n_1![i]!;
    o_v![i] = v;
    const beta = Math.asin((d2 - d1) / (2 * c));
    o_beta![i] = beta;
    const theta1 = Math.PI - 2 * beta;
    o_theta_1![i] = theta1;
    const theta2 = Math.PI + 2 * beta;
    o_theta_2![i] = theta2;
    const L = 2 * c * Math.cos(beta) + (theta1 * d1 + theta2 * d2) / 2;
    o_L![i] = L;
    o_L_i![i] = L - Math.PI * thick;
    const m = rho![i]! * width * thick;
    o_m![i] = m;
    const vCase = s_n![i]! * v;
    const Fc = m * (vCase * vCase);
    o_F_c![i] = Fc;
    const k1 = Math.exp(mu_1![i]! * theta1);
    o_k_1![i] = k1;
    const k2 = Math.exp(mu_2![i]! * theta2);
    o_k_2![i] = k2;
    const k = Math.min(k1, k2);
    o_k![i] = k;
    const Fu = duty / v;
    o_F_u![i] = Fu;
    const F1min = Fc + (Fu * k) / (k - 1);
    o_F_1min![i] = F1min;
    o_F_2min![i] = F1min - Fu;
    const F1lim = sigma_allow![i]! * width * thick;
    o_F_1lim![i] = F1lim;
    const F2lim = Fc + (F1lim - Fc) / k;
    o_F_2lim![i] = F2lim;
    o_P_lim![i] = (F1lim - F2lim) * v;
    o_b_req![i] = (Fu * k) / ((k - 1) * (sigma_allow![i]! - rho![i]! * (vCase * vCase)) * thick);
    o_v_opt![i] = Math.sqrt(F1lim / (3 * m));
    const F0 = F_0![i]!;
    const F0e = F0 - Fc;
    o_F_0eff![i] = F0e;
    const P0 = (2 * F0e * v * (k - 1)) / (k + 1);
    o_P_0![i] = P0;
    o_S_slip![i] = P0 / duty;
    o_F_0req![i] = Fc + (S_req![i]! * Fu * (k + 1)) / (2 * (k - 1));
    const F1 = F0 + Fu / 2;
    o_F_1![i] = F1;
    o_F_2![i] = F0 - Fu / 2;
    const sigma1 = F1 / (width * thick);
    o_sigma_1![i] = sigma1;
    const sigmaB = (E_b![i]! * thick) / Math.min(d1, d2);
    o_sigma_b![i] = sigmaB;
    o_sigma_max![i] = sigma1 + sigmaB;
    const F1e = F0e + Fu / 2;
    o_F_1eff![i] = F1e;
    const F2e = F0e - Fu / 2;
    o_F_2eff![i] = F2e;
    o_F_W![i] = Math.sqrt(F1e * F1e + F2e * F2e - 2 * F1e * F2e * Math.cos(theta1));
    o_psi_W![i] = Math.atan2(Fu * Math.sin(beta), (F1e + F2e) * Math.cos(beta));
    const FW0 = 2 * F0 * Math.sin(theta1 / 2);
    o_F_W0![i] = FW0;
    o_F_W0new![i] = f_new![i]! * FW0;
  }
}
