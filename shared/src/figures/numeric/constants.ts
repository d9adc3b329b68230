/** Molar gas constant, J/(mol K), exact since 2019 (SI Brochure, 9th ed.; CODATA 2018). */
export const GAS_CONSTANT_J_PER_MOL_K = 8.314462618;
/** Standard gravity, m/s², exact (3rd CGPM, 1901). */
export const GRAVITY_M_PER_S2 = 9.80665;
