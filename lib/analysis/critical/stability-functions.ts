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

/** (2 − 2cos φ − φ sin φ)/φ⁴ in φ²: its own series near φ = 0. */
const seriesD = [1 / 12, -1 / 180, 1 / 6720, -1 / 453600, 1 / 47900160] as const;

/**
 * The same for a member that shears, the shear force square to the deflected axis (Engesser 1891): φ² = x/β, β = 1 − P/GAv,
 * s = φ(sin φ − βφ cos φ)/D, sc = φ(βφ − sin φ)/D, D = 2 − 2cos φ − βφ sin φ; without axial force s = (4 + Φ)/(1 + Φ),
 * sc = (2 − Φ)/(1 + Φ), Φ = 12EI/(GAv L²). From EI ψ″ + Pψ/β = Q/β and v′ = (ψ − Q/GAv)/β with ends that do not move apart.
 *
 * @param x P L²/EI   @param shear Φ
 */
export function shearStabilityFunctions(x: number, shear: number, out: StabilityFunctions): StabilityFunctions {
  const beta = shearLoss(x, shear);
  const y = x / beta;
  stabilityFunctions(y, out);
  // all divided by φ⁴, where nothing cancels near φ = 0
  const phi = Math.sqrt(Math.abs(y));
  const less = (beta * shear) / 12;
  let d = 0;
  let sinc: number;
  let cos: number;
  if (Math.abs(y) < nearZero) {
    for (let i = 4; i >= 0; i--) d = d * y + seriesD[i]!;
    sinc = 1 - (y / 6) * (1 - (y / 20) * (1 - (y / 42) * (1 - y / 72)));
    cos = 1 - (y / 2) * (1 - (y / 12) * (1 - (y / 30) * (1 - (y / 56) * (1 - y / 90))));
  } else if (y > 0) {
    cos = Math.cos(phi);
    sinc = Math.sin(phi) / phi;
    d = (2 - 2 * cos - y * sinc) / (y * y);
  } else {
    // all by cosh φ, which divides out
    const sech = 1 / Math.cosh(phi);
    cos = 1;
    sinc = Math.tanh(phi) / phi;
    d = (2 * sech - 2 - y * sinc) / (y * y);
    const divisor = d + less * sinc;
    out.s = (out.s * d + less) / divisor;
    out.sc = (out.sc * d - less * sech) / divisor;
    return out;
  }
  const divisor = d + less * sinc;
  out.s = (out.s * d + less * cos) / divisor;
  out.sc = (out.sc * d - less) / divisor;
  return out;
}

/** β = 1 − P/GAv; kept above nought, beyond which the member has long buckled. @param x P L²/EI  @param shear Φ */
export function shearLoss(x: number, shear: number): number {
  return Math.max(1e-6, 1 - (x * shear) / 12);
}
