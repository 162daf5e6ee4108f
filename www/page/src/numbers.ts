/** How numbers are shown: significant figures with trailing zeros, decimal points whatever the locale. */

const EXPONENT_FROM = 7;
const EXPONENT_BELOW = -4;

/** `value` with `digits` significant figures; in exponent form from 10^7 and below 10^-4. Ties go away from zero. */
export function format(value: number, digits: number): string {
  if (value === 0) return "0";
  // The standard rounds the exact value here, ties to the larger magnitude.
  const [mantissa = "", power = "0"] = Math.abs(value).toExponential(digits - 1).split("e");
  const sign = value < 0 ? "-" : "";
  return sign + placed(mantissa.replace(".", ""), Number(power));
}

/** The figures with point, zeros and exponent. */
function placed(figures: string, power: number): string {
  if (power >= EXPONENT_FROM || power < EXPONENT_BELOW) return `${pointed(figures, 1)}e${power}`;
  return power < 0 ? `0.${"0".repeat(-power - 1)}${figures}` : pointed(figures, power + 1);
}

/** The figures with so many of them before the point, zeros filled in. */
function pointed(figures: string, whole: number): string {
  const padded = figures.padEnd(whole, "0");
  return padded.length === whole ? padded : `${padded.slice(0, whole)}.${padded.slice(whole)}`;
}

/** The same with a true minus sign, for the eye. */
export function shown(value: number, digits: number): string {
  return signed(format(value, digits));
}

/** A number's text with a true minus sign, also in the exponent. */
export function signed(text: string): string {
  return text.replaceAll("-", "\u2212");
}

/** Text with every true minus sign as it is typed, for the clipboard. */
export function typed(text: string): string {
  return text.replaceAll("\u2212", "-");
}

/** A count with narrow blanks between thousands. */
export function count(value: number): string {
  return String(value).replace(/\B(?=(\d{3})+$)/g, "\u202f");
}
