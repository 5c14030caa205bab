import { formatSignificant } from "@/lib/units";

/** A number for people, with its power of ten raised. */
export function NumberText({ value, digits = 4 }: { value: number; digits?: number }) {
  const text = formatSignificant(value, digits);
  const match = /^(.*)·10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)$/.exec(text);
  if (!match) return <>{text}</>;
  const plain = [...(match[2] ?? "")]
    .map((character) => (character === "⁻" ? "\u2212" : String("⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(character))))
    .join("");
  return (
    <>
      {match[1]}·10<sup className="text-[.7em] leading-none">{plain}</sup>
    </>
  );
}
