/**
 * Student's t for a whole number of degrees of freedom, where its distribution is a finite series. M. Abramowitz
 * and I. A. Stegun, "Handbook of Mathematical Functions", 26.7.3 and 26.7.4.
 */

/** Probability that |t| stays under `t` (0 or more) with `degrees` of freedom. Throws for fewer than one. */
export function studentCentral(t: number, degrees: number): number {
  if (!(Number.isInteger(degrees) && degrees >= 1)) {
    throw new RangeError(`Student’s t has one degree of freedom or more, in whole numbers, not ${degrees}.`);
  }
  const theta = Math.atan(t / Math.sqrt(degrees));
  const cos2 = Math.cos(theta) ** 2;
  const isOdd = degrees % 2 === 1;
  let term = isOdd ? Math.cos(theta) : 1;
  let series = degrees === 1 ? 0 : term;
  for (let k = isOdd ? 3 : 2; k <= degrees - 2; k += 2) {
    term *= (cos2 * (k - 1)) / k;
    series += term;
  }
  return isOdd ? (2 / Math.PI) * (theta + Math.sin(theta) * series) : Math.sin(theta) * series;
}

/** The t within ± which a share `confidence` (0 to under 1) lies, by halving; 2.447 for 0.95 and 6 degrees. */
export function studentTwoSided(confidence: number, degrees: number): number {
  if (!(confidence >= 0 && confidence < 1)) {
    throw new RangeError(`A confidence is 0 to under 1, not ${confidence}.`);
  }
  let low = 0;
  let high = 1;
  while (studentCentral(high, degrees) < confidence) high *= 2;
  for (let step = 0; step < 80; step++) {
    const middle = (low + high) / 2;
    if (studentCentral(middle, degrees) < confidence) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
