/** Beyond these sizes people read powers of ten more easily than zeros. */
const smallestPlain = 1e-3;
const largestPlain = 1e6;

/**
 * A number for people: `digits` significant digits with trailing zeros kept, a real minus (U+2212), `2.6·10⁻⁴` outside
 * 0.001 … 1 000 000. Throws RangeError for numbers that are not finite.
 */
export function formatSignificant(value: number, digits: number): string {
  if (!Number.isFinite(value)) throw new RangeError("Only finite numbers are shown.");
  const kept = Math.min(Math.max(Math.round(digits), 1), 17);
  if (value === 0) return "0";
  const [mantissa = "", power = "0"] = Math.abs(value)
    .toExponential(kept - 1)
    .split("e");
  const exponent = Number(power);
  const rounded = Number(`${mantissa}e${exponent}`);
  const minus = value < 0 ? "−" : "";
  if (rounded < smallestPlain || rounded >= largestPlain)
    return `${minus}${mantissa}·10${superscript(String(exponent))}`;
  return minus + placePoint(mantissa.replace(".", ""), exponent);
}

/** Digits of the mantissa with the point where the exponent puts it; missing whole digits are zeros. */
function placePoint(digits: string, exponent: number): string {
  if (exponent < 0) return `0.${"0".repeat(-exponent - 1)}${digits}`;
  const whole = digits.slice(0, exponent + 1).padEnd(exponent + 1, "0");
  const decimals = digits.slice(exponent + 1);
  return decimals === "" ? whole : `${whole}.${decimals}`;
}

function superscript(text: string): string {
  return text.replace("-", "⁻").replace(/\d/g, (digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹".charAt(Number(digit)));
}

/** The shortest text that reads back as the same double. Throws RangeError for numbers that are not finite. */
export function formatExact(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError("Only finite numbers are written.");
  return String(value + 0);
}
