/** Exact definitions: inch, pound (International Yard and Pound Agreement, 1959), standard gravity (3rd CGPM, 1901). */
export const inch_m = 0.0254;
export const foot_m = 0.3048;
export const pound_kg = 0.45359237;
/** Standard gravity, m/s². */
export const g_m_s2 = 9.80665;
/** 1 lbf in N, the exact decimal. */
export const lbf_N = 4.4482216152605;
export const kip_N = 4448.2216152605;
export const fahrenheit_K = 5 / 9;
export const degree_rad = Math.PI / 180;
