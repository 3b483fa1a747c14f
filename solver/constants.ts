/** μ0 as the older SI had it exactly, 4π·10⁻⁷ H/m; the 2018 value differs by 1.3e-10 (CODATA 2022: +1.3e-10 relative). */
export const MU0 = 4e-7 * Math.PI;
