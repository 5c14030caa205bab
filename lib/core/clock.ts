/** The one place that asks what time it is. */
export function now(): Date {
  return new Date();
}

export const second = 1000;
export const minute = 60 * second;
export const hour = 60 * minute;
export const day = 24 * hour;

/** A moment `milliseconds` after `from`. */
export function after(from: Date, milliseconds: number): Date {
  return new Date(from.getTime() + milliseconds);
}
