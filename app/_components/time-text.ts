const day = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  year: "numeric",
  timeZone: "UTC",
});
const moment = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  year: "numeric",
  hour: "2-digit",
  minute: "2-digit",
  timeZone: "UTC",
});

/** A day for people: 14 Sep 2026. */
export function dayText(instant: string): string {
  return day.format(new Date(instant));
}

/** Day and time for people, in UTC: 14 Sep 2026, 09:30 UTC. */
export function momentText(instant: string): string {
  return `${moment.format(new Date(instant))} UTC`;
}
