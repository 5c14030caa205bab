import { elementAt, interpolateLinear, requireElements, requireLength, sameLength } from "../runtime/lists";
import { isScalarFunction, scalarFunctions } from "../runtime/scalar";

/** A number or a list, as the slow walk computes them. */
export type WalkValue = number | Float64Array;

/** Applies a function of numbers element by element; numbers spread over lists. */
export function spread(f: (...values: number[]) => number, values: readonly WalkValue[]): WalkValue {
  let length: number | null = null;
  for (const value of values) {
    if (typeof value === "number") continue;
    if (length !== null) sameLength(length, value.length);
    length = value.length;
  }
  if (length === null) return f(...(values as number[]));
  const result = new Float64Array(length);
  for (let i = 0; i < length; i++) {
    result[i] = f(...values.map((value) => (typeof value === "number" ? value : value[i]!)));
  }
  return result;
}

/** Value of a function of the language, by its row name. */
export function callFunction(name: string, values: readonly WalkValue[]): WalkValue {
  const [first = NaN, ...others] = values;
  if (isScalarFunction(name)) {
    const f: (...values: number[]) => number = scalarFunctions[name];
    if (typeof first === "number" || others.length > 0) return spread(f, values);
    let result = name === "min" ? Infinity : name === "max" ? -Infinity : 0;
    if (name !== "min" && name !== "max" && name !== "mean") return spread(f, values);
    for (const element of first) result = name === "mean" ? result + element : f(result, element);
    return name === "mean" ? result / first.length : result;
  }
  if (name === "interpolate") {
    const [xs, ys] = others.map(asList) as [Float64Array, Float64Array];
    sameLength(xs.length, ys.length);
    return spread((x) => interpolateLinear(x, xs, ys, xs.length), [first]);
  }
  return callListFunction(name, asList(first), others);
}

function callListFunction(name: string, list: Float64Array, others: readonly WalkValue[]): WalkValue {
  const [other = NaN] = others;
  switch (name) {
    case "sum":
      return list.reduce((sum, element) => sum + element, 0);
    case "product":
      return list.reduce((product, element) => product * element, 1);
    case "cumsum": {
      let sum = 0;
      return list.map((element) => (sum += element));
    }
    case "count":
      return list.length;
    case "first":
      requireElements(list.length);
      return list[0]!;
    case "last":
      requireElements(list.length);
      return list[list.length - 1]!;
    case "at":
      return elementAt(list, list.length, asNumber(other));
    case "prepend":
      return Float64Array.of(asNumber(other), ...list);
    case "append":
      return Float64Array.of(...list, asNumber(other));
    case "drop_first":
      requireLength(list.length - 1);
      return list.slice(1);
    case "drop_last":
      requireLength(list.length - 1);
      return list.slice(0, -1);
    case "reverse":
      return list.toReversed();
    case "weighted_mean": {
      const weights = asList(other);
      sameLength(list.length, weights.length);
      let [sum, weight] = [0, 0];
      for (const [i, x] of list.entries()) {
        sum += x * weights[i]!;
        weight += weights[i]!;
      }
      return sum / weight;
    }
    default:
      throw new Error(`The function ${name} has no code.`);
  }
}

export function asNumber(value: WalkValue): number {
  if (typeof value !== "number") throw new Error("A number was expected, not a list.");
  return value;
}

export function asList(value: WalkValue): Float64Array {
  if (typeof value === "number") throw new Error("A list was expected, not a number.");
  return value;
}
