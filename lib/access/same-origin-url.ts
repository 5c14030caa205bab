/** The address to go to after signing in: only one of this site, whatever the link said. */
export function sameOriginUrl(wanted: string, base: string): string {
  const origin = new URL(base).origin;
  if (!URL.canParse(wanted, origin)) return origin;
  const url = new URL(wanted, origin);
  return url.origin === origin ? url.href : origin;
}
