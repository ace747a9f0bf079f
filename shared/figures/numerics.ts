/** What floating-point sums may be off by: a value within this of its limit is at the limit. */
export const slip = 1e-9;

/** Lanczos coefficients (g = 7, n = 9): about 15 correct digits. */
const lanczos = [
  0.9999999999998099, 676.5203681218851, -1259.1392167224028, 771.3234287776531, -176.6150291621406,
  12.507343278686905, -0.13857109526572012, 9.984369578019572e-6, 1.5056327351493116e-7,
] as const;

export function lnGamma(x: number): number {
  const z = x - 1;
  const sum = lanczos.reduce((total, c, i) => total + (i === 0 ? c : c / (z + i)), 0);
  const t = z + 7.5;
  return 0.5 * Math.log(2 * Math.PI) + (z + 0.5) * Math.log(t) - t + Math.log(sum);
}

/** Regularised lower incomplete gamma P(a, x): series below a + 1, continued fraction above. */
export function gammaP(a: number, x: number): number {
  if (x <= 0) return 0;
  const scale = Math.exp(a * Math.log(x) - x - lnGamma(a));
  return x < a + 1 ? scale * series(a, x) : 1 - scale * continuedFraction(a, x);
}

function series(a: number, x: number): number {
  let term = 1 / a;
  let sum = term;
  for (let n = 1; Math.abs(term) > Math.abs(sum) * 1e-16; n++) {
    term *= x / (a + n);
    sum += term;
  }
  return sum;
}

/** Modified Lentz. */
function continuedFraction(a: number, x: number): number {
  const tiny = 1e-300;
  let b = x + 1 - a;
  let c = 1 / tiny;
  let d = 1 / b;
  let h = d;
  for (let i = 1, delta = 0; Math.abs(delta - 1) > 1e-15 && i < 1e6; i++) {
    const an = -i * (i - a);
    b += 2;
    d = 1 / nonZero(an * d + b);
    c = nonZero(b + an / c);
    delta = d * c;
    h *= delta;
  }
  return h;

  function nonZero(value: number): number {
    return Math.abs(value) < tiny ? tiny : value;
  }
}

/** The x at which P(a, x) = p, by halving. Half the chi-square quantile of 2a degrees of freedom. */
export function inverseGammaP(a: number, p: number): number {
  let low = 0;
  let high = a + 1;
  while (gammaP(a, high) < p) high *= 2;
  for (let i = 0; i < 200 && high - low > 1e-14 * high; i++) {
    const middle = (low + high) / 2;
    if (gammaP(a, middle) < p) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
