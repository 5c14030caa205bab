let made = 0;

/** A name that no other test of this process used. */
export function unique(word: string): string {
  made += 1;
  return `${word}-${made}`;
}
