/** Terms of the series of s and sc in φ², used near φ = 0 where the closed forms cancel. */
const seriesS = [4, -2 / 15, -11 / 6300, -1 / 27000, -509 / 582120000, -14617 / 681080400000] as const;
const seriesSc = [2, 1 / 30, 13 / 12600, 11 / 378000, 907 / 1164240000, 27641 / 1362160800000] as const;
const nearZero = 0.1;

/** Rotational stiffness s and carry-over product sc of a strut or tie, in EI/L. */
export interface StabilityFunctions {
  s: number;
  sc: number;
}

/**
 * Stability functions of a prismatic member under a constant axial force: m₁ = (EI/L)(s θ₁ + sc θ₂).
 *
 * @param x P L²/EI: above zero for compression (trigonometric), below for tension (hyperbolic)
 * s = φ(sin φ − φ cos φ)/(2 − 2cos φ − φ sin φ), sc = φ(φ − sin φ)/(…), φ² = x; Livesley and Chandler 1956;
 * Horne and Merchant, The Stability of Frames, 1965. Without axial force s = 4, sc = 2.
 */
export function stabilityFunctions(x: number, out: StabilityFunctions): StabilityFunctions {
  if (Math.abs(x) < nearZero) {
    let s = 0;
    let sc = 0;
    for (let i = 5; i >= 0; i--) {
      s = s * x + seriesS[i]!;
      sc = sc * x + seriesSc[i]!;
    }
    out.s = s;
    out.sc = sc;
    return out;
  }
  const phi = Math.sqrt(Math.abs(x));
  if (x > 0) {
    const sin = Math.sin(phi);
    const cos = Math.cos(phi);
    const divisor = 2 - 2 * cos - phi * sin;
    out.s = (phi * (sin - phi * cos)) / divisor;
    out.sc = (phi * (phi - sin)) / divisor;
  } else {
    // divided by cosh φ, so that a long tie does not overflow
    const tanh = Math.tanh(phi);
    const sech = 1 / Math.cosh(phi);
    const divisor = 2 * sech - 2 + phi * tanh;
    out.s = (phi * (phi - tanh)) / divisor;
    out.sc = (phi * (tanh - phi * sech)) / divisor;
  }
  return out;
}
