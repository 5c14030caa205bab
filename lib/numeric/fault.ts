export type NumericFaultCode = "no-sign-change" | "pole" | "not-finite" | "not-converged";

/** A numerical method that could not do what it was asked; `details` holds the numbers that show why. */
export class NumericFault extends Error {
  readonly code: NumericFaultCode;
  readonly details: Readonly<Record<string, number>>;

  constructor(code: NumericFaultCode, message: string, details: Readonly<Record<string, number>> = {}) {
    super(message);
    this.name = "NumericFault";
    this.code = code;
    this.details = details;
  }
}

/** A number of a message, to six digits; `details` holds it in full. */
export function inWords(value: number): string {
  return String(Number(value.toPrecision(6)));
}
