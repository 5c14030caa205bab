import type { ListLength } from "../types";

/**
 * A stretch of generated code and the values computed in it. A value is looked for here and outwards, so what was
 * computed in a branch or in the body of a special form is never read outside of it.
 * - `top`: body of a generated function
 * - `branch`: one side of a conditional
 * - `body`: body of a special form, run any number of times
 * - `loop`: elements of a list; its registers hold elements, and numbers are computed in front of it
 */
export class Region {
  readonly code: string[] = [];
  readonly registers = new Map<number, string>();
  /** Registers to be judged finite at the end of the region. */
  judged: string[] = [];

  private constructor(
    readonly kind: "top" | "branch" | "body" | "loop",
    readonly parent: Region | null,
    /** Of a body: the bit of its variable in `Value.free`. */
    readonly variable: number,
    /** Of a body: it is evaluated at least once whenever the form is reached. */
    readonly always: boolean,
    /** Of a loop: its index register and the length it runs over. */
    readonly index: string,
    readonly length: ListLength | null,
  ) {}

  static top(): Region {
    return new Region("top", null, 0, true, "", null);
  }

  static branch(parent: Region): Region {
    return new Region("branch", parent, 0, false, "", null);
  }

  static body(parent: Region, variable: number, always: boolean): Region {
    return new Region("body", parent, variable, always, "", null);
  }

  static loop(parent: Region, index: string, length: ListLength): Region {
    return new Region("loop", parent, 0, false, index, length);
  }

  /** Register of a value computed here or outside of here. */
  find(id: number): string | undefined {
    return this.registers.get(id) ?? this.parent?.find(id);
  }

  /**
   * Outermost region in which a value that reads the variables `free` can be computed on the way here.
   * @param evenUntaken whether it may be computed although the branch that needs it is not taken
   */
  outermost(free: number, evenUntaken = false): Region {
    const passes =
      (this.kind === "body" && (free & this.variable) === 0) || (this.kind === "branch" && evenUntaken);
    return passes && this.parent ? this.parent.outermost(free, evenUntaken) : this;
  }

  /** The region in which numbers are computed: in front of a loop. */
  get ofNumbers(): Region {
    if (this.kind !== "loop") return this;
    if (!this.parent) throw new Error("A loop stands in a region.");
    return this.parent;
  }
}
