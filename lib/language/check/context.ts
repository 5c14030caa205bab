import type { Expression, FunctionInstance, NumberType } from "../types";
import { limits } from "../limits";
import type { Place } from "./place";
import type { Symbols } from "./symbols";
import type { NumberValue, Value } from "./value";

/** A parameter or bound variable. */
export interface Local {
  readonly slot: number;
  readonly type: NumberType;
  /** As of the value that it stands for. */
  readonly law: boolean;
}

/** What a function of the working gave for one combination of argument types; null when it has an error. */
export interface CheckedFunction {
  readonly index: number;
  readonly result: NumberValue;
}

/** What one check of a definition has found so far. */
export interface ProgramState {
  readonly symbols: Symbols;
  readonly working: Place;
  readonly instances: FunctionInstance[];
  readonly remembered: Map<string, CheckedFunction | null>;
  /** Inputs, lines and functions that were read. */
  readonly used: Set<string>;
  slots: number;
  /** Levels of the expression being checked, through the functions it calls. */
  depth: number;
  /** Nodes checked, each function once for each combination of argument types. */
  nodes: number;
  iterates: boolean;
}

/** What an expression can see where it stands. */
export interface Context {
  readonly state: ProgramState;
  readonly place: Place;
  /** Statements before this one are visible; -1 where only inputs are. */
  readonly before: number;
  readonly locals: ReadonlyMap<string, Local>;
  /** Comparisons count as equal within 1e-9: in requires, limits and applies-when. */
  readonly tolerant: boolean;
  /** Collects the names that are read in this text itself. */
  readonly named: Set<string>;
}

/** Checks one expression; null when it has an error, which is told already. */
export type Check = (expression: Expression, context: Context) => Value | null;

/** Thrown when the limit on nodes is met: the check of the definition ends there. */
export class LimitMet extends Error {
  constructor() {
    super(`More than ${limits.nodes} nodes after functions are expanded.`);
    this.name = "LimitMet";
  }
}

export function withLocals(context: Context, added: Iterable<readonly [string, Local]>): Context {
  return { ...context, locals: new Map([...context.locals, ...added]) };
}
