import type { PropertyName } from "@/lib/language";
import { nearlyEqual } from "@/lib/language/runtime/comparison";
import type { FormCurve } from "./property-forms";

/** A form with its valid range in kelvin. */
export interface CompiledPiece extends FormCurve {
  readonly min: number;
  readonly max: number;
  readonly source: string;
}

/** How a temperature lies to the valid range. */
export type Validity = "inside" | "below" | "above" | "gap";

/**
 * A property over all its pieces. Each piece answers up to the joint with its neighbour (the middle of a gap);
 * `extend` continues the outermost forms, otherwise the value at the end of the range is held.
 */
export class CompiledProperty {
  readonly name: PropertyName;
  /** Ascending by range. */
  readonly pieces: readonly CompiledPiece[];
  readonly min: number;
  readonly max: number;
  /** Declared units, for messages and plots. */
  readonly unit: string;
  readonly argumentUnit: string;
  readonly source: string;
  /** Upper end of the reach of each piece but the last. */
  private readonly joints: readonly number[];
  private readonly gaps: readonly (readonly [number, number])[];

  constructor(
    name: PropertyName,
    pieces: readonly CompiledPiece[],
    declared: { unit: string; argumentUnit: string; source: string },
  ) {
    this.name = name;
    this.pieces = [...pieces].sort((a, b) => a.min - b.min);
    this.unit = declared.unit;
    this.argumentUnit = declared.argumentUnit;
    this.source = declared.source;
    this.min = this.pieces[0]!.min;
    this.max = Math.max(...pieces.map((piece) => piece.max));
    const joints: number[] = [];
    const gaps: [number, number][] = [];
    for (let i = 1; i < this.pieces.length; i++) {
      const end = this.pieces[i - 1]!.max;
      const begin = this.pieces[i]!.min;
      joints.push(nearlyEqual(end, begin) ? begin : (end + begin) / 2);
      if (begin > end && !nearlyEqual(end, begin)) gaps.push([end, begin]);
    }
    this.joints = joints;
    this.gaps = gaps;
  }

  validity(temperature: number): Validity {
    if (temperature < this.min && !nearlyEqual(temperature, this.min)) return "below";
    if (temperature > this.max && !nearlyEqual(temperature, this.max)) return "above";
    return this.gaps.length > 0 && this.gapAround(temperature) ? "gap" : "inside";
  }

  private gapAround(temperature: number): readonly [number, number] | null {
    for (const gap of this.gaps) {
      const within = temperature > gap[0] && temperature < gap[1];
      if (within && !nearlyEqual(temperature, gap[0]) && !nearlyEqual(temperature, gap[1])) return gap;
    }
    return null;
  }

  /** The first gap between pieces that an interval crosses, or null. */
  gapBetween(from: number, to: number): readonly [number, number] | null {
    const lo = Math.min(from, to);
    const hi = Math.max(from, to);
    return (
      this.gaps.find(
        (gap) => lo < gap[1] && hi > gap[0] && !nearlyEqual(lo, gap[1]) && !nearlyEqual(hi, gap[0]),
      ) ?? null
    );
  }

  private pieceAt(temperature: number): CompiledPiece {
    let i = 0;
    while (i < this.joints.length && temperature > this.joints[i]!) i++;
    return this.pieces[i]!;
  }

  /** Value in SI at a temperature in kelvin. */
  value(temperature: number, extend: boolean): number {
    const piece = this.pieces.length === 1 ? this.pieces[0]! : this.pieceAt(temperature);
    return piece.value(extend ? temperature : held(temperature, piece));
  }

  /** Mean over an interval in SI; the value itself where the ends are equal. */
  mean(from: number, to: number, extend: boolean): number {
    if (from === to) return this.value(from, extend);
    const lo = Math.min(from, to);
    const hi = Math.max(from, to);
    const first = this.pieceAt(lo);
    if (lo >= first.min && hi <= first.max) return first.mean(lo, hi);
    let sum = 0;
    let begin = lo;
    for (let i = 0; i < this.pieces.length && begin < hi; i++) {
      const end = Math.min(hi, this.joints[i] ?? Infinity);
      if (end <= begin) continue;
      sum += this.weighted(this.pieces[i]!, begin, end, extend);
      begin = end;
    }
    return sum / (hi - lo);
  }

  /** Integral over a part of one piece's reach. */
  private weighted(piece: CompiledPiece, lo: number, hi: number, extend: boolean): number {
    if (extend) return (hi - lo) * piece.mean(lo, hi);
    const begin = Math.max(lo, Math.min(hi, piece.min));
    const end = Math.min(hi, Math.max(lo, piece.max));
    const inside = end > begin ? (end - begin) * piece.mean(begin, end) : 0;
    const before = begin > lo ? (begin - lo) * piece.value(piece.min) : 0;
    const after = hi > end && end >= begin ? (hi - end) * piece.value(piece.max) : 0;
    return before + inside + after;
  }
}

function held(temperature: number, piece: CompiledPiece): number {
  return temperature < piece.min ? piece.min : temperature > piece.max ? piece.max : temperature;
}
