/** The most recently used entries, at most `most` of them. */
export class Lru<Value> {
  private readonly entries = new Map<string, Value>();

  constructor(private readonly most: number) {}

  get(key: string): Value | undefined {
    const value = this.entries.get(key);
    if (value === undefined) return undefined;
    this.entries.delete(key);
    this.entries.set(key, value);
    return value;
  }

  set(key: string, value: Value): void {
    this.entries.delete(key);
    this.entries.set(key, value);
    if (this.entries.size <= this.most) return;
    const oldest = this.entries.keys().next();
    if (!oldest.done) this.entries.delete(oldest.value);
  }

  get size(): number {
    return this.entries.size;
  }
}
