/** Small seeded generator (mulberry32), so that a failing program can be named by its seed. */
export class Random {
  private state: number;

  constructor(seed: number) {
    this.state = seed >>> 0;
  }

  next(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0;
    let t = this.state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  }

  chance(probability: number): boolean {
    return this.next() < probability;
  }

  whole(from: number, to: number): number {
    return from + Math.floor(this.next() * (to - from + 1));
  }

  between(from: number, to: number): number {
    return Number((from + this.next() * (to - from)).toPrecision(3));
  }

  pick<T>(items: readonly T[]): T {
    return items[this.whole(0, items.length - 1)]!;
  }
}

/** Quantities of random programs. */
export type Kind =
  | "number"
  | "length"
  | "area"
  | "temperature"
  | "difference"
  | "conductivity"
  | "coefficient"
  | "flux"
  | "power";

/** A random literal of ordinary size. */
export function literal(random: Random, kind: Kind): string {
  switch (kind) {
    case "number":
      return random.chance(0.3) ? String(random.whole(1, 4)) : String(random.between(0.1, 3));
    case "length":
      return random.chance(0.5) ? `"${random.between(5, 400)} mm"` : `"${random.between(0.01, 0.5)} m"`;
    case "area":
      return `"${random.between(0.01, 2)} m²"`;
    case "temperature":
      return random.chance(0.5) ? `"${random.between(1, 300)} °C"` : `"${random.between(280, 600)} K"`;
    case "difference":
      return random.chance(0.5) ? `"${random.between(1, 90)} ΔK"` : `"${random.between(1, 90)} Δ°C"`;
    case "conductivity":
      return `"${random.between(0.03, 40)} W/(m·K)"`;
    case "coefficient":
      return `"${random.between(2, 80)} W/(m²·K)"`;
    case "flux":
      return `"${random.between(10, 900)} W/m²"`;
    case "power":
      return `"${random.between(1, 90)} W"`;
  }
}
