/** c₀ + c₁x + c₂x² + … by Horner's scheme. */
export function polynomial(x: number, coefficients: readonly number[]): number {
  let sum = 0;
  for (let power = coefficients.length - 1; power >= 0; power--) sum = sum * x + coefficients[power];
  return sum;
}

/** A quotient of two polynomials, coefficients from the constant term upward. */
export function rational(x: number, numerator: readonly number[], denominator: readonly number[]): number {
  return polynomial(x, numerator) / polynomial(x, denominator);
}
