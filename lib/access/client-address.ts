/**
 * Address of the caller as the last `trustedProxies` proxies tell it, or null when none is declared: a header that
 * anybody can send is not believed.
 */
export function clientAddress(headers: Headers, trustedProxies: number): string | null {
  if (trustedProxies === 0) return null;
  const hops = (headers.get("x-forwarded-for") ?? "")
    .split(",")
    .map((hop) => hop.trim())
    .filter((hop) => hop !== "");
  return hops[hops.length - trustedProxies] ?? null;
}
