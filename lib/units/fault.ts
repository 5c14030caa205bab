import type { Reading, UnitFault } from "./types";

/** Thrown inside the readers only; every public reader turns it into a `Reading`. */
export class ReadError extends Error {
  readonly fault: UnitFault;
  /** No other grammar may give the text another meaning. */
  readonly final: boolean;

  constructor(fault: UnitFault, final = false) {
    super(fault.message);
    this.fault = fault;
    this.final = final;
  }
}

export interface Place {
  readonly start: number;
  readonly end: number;
}

export function unreadable(
  place: Place,
  message: string,
  suggestions: readonly string[] = [],
  final = false,
): ReadError {
  return new ReadError(
    { code: "unreadable-unit", message, start: place.start, end: place.end, suggestions },
    final,
  );
}

/** Runs a reader; a `ReadError` becomes its fault, anything else is a fault of ours and goes on. */
export function reading<T>(read: () => { value: T; notices: readonly string[] }): Reading<T> {
  try {
    return { ok: true, ...read() };
  } catch (error) {
    if (error instanceof ReadError) return { ok: false, fault: error.fault };
    throw error;
  }
}
