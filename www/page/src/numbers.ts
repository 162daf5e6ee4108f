/** How numbers are shown: significant figures with trailing zeros, decimal points whatever the locale. */

const EXPONENT_FROM = 1e7;
const EXPONENT_BELOW = 1e-4;

/** `value` with `digits` significant figures; in exponent form from 10^7 and below 10^-4. Ties go away from zero. */
export function format(value: number, digits: number): string {
  if (value === 0) return "0";
  const rounded = Math.abs(Number(value.toPrecision(digits)));
  if (rounded >= EXPONENT_FROM || rounded < EXPONENT_BELOW) return value.toExponential(digits - 1).replace("e+", "e");
  const before = Math.floor(Math.log10(rounded)) + 1;
  // A whole number longer than the figures asked for keeps its zeros in front of the point.
  if (before >= digits) return Number(value.toPrecision(digits)).toFixed(0);
  return withoutExponent(value, digits);
}

function withoutExponent(value: number, digits: number): string {
  const text = value.toPrecision(digits);
  if (!text.includes("e")) return text;
  const [mantissa = "", exponent = "0"] = text.split("e");
  const decimals = Math.max(0, (mantissa.split(".")[1]?.length ?? 0) - Number(exponent));
  return Number(text).toFixed(decimals);
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

/** A count with blanks between thousands. */
export function count(value: number): string {
  return String(value).replace(/\B(?=(\d{3})+$)/g, "\u202f");
}
