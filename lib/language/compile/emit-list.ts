import { isScalarFunction } from "../runtime/scalar";
import type { ListLength } from "../types";
import { emitOperation } from "./emit-number";
import { emitListForm } from "./emit-form";
import type { FunctionWriter } from "./function-writer";
import { Region } from "./region";
import { lengthKey, type Value } from "./value";

/** Functions that show the elements of another list in another order, without copying. */
const views: ReadonlySet<string> = new Set(["drop_first", "drop_last", "reverse"]);

function operandOf(value: Value, index: number): Value {
  const operand = value.operands[index];
  if (!operand) throw new Error(`${value.operation.is} lacks operand ${index}.`);
  return operand;
}

function lengthOf(value: Value): ListLength {
  if (!value.length) throw new Error(`${value.operation.is} is not a list.`);
  return value.length;
}

/** Register of a buffer that holds the list. It may be longer than the list. */
export function emitList(writer: FunctionWriter, value: Value, from: Region): string {
  const here = from.ofNumbers;
  const found = here.find(value.id);
  if (found !== undefined) return found;
  const operation = value.operation;
  if (operation.is === "column") return writer.column(operation.index);
  if (operation.is === "line") return writer.lineList(operation.index);
  const region = value.still ? here.outermost(value.free) : here;
  const room = writer.room(lengthOf(value));
  fillList(writer, value, room, region);
  region.registers.set(value.id, room);
  return room;
}

/** Writes code that puts the elements of the list (or one number for all) into a buffer. */
export function fillList(
  writer: FunctionWriter,
  value: Value,
  into: string,
  region: Region,
  length = lengthOf(value),
): void {
  const operation = value.operation;
  const found = region.find(value.id) !== undefined;
  if (!found && operation.is === "select") {
    fillSelected(writer, value, into, region, length);
  } else if (!found && operation.is === "form") {
    emitListForm(writer, value, operation, into, region);
  } else if (!found && operation.is === "call" && operation.name === "prepend") {
    // The list is written one place on, so the value may be computed first or last alike.
    const first = writer.number(operandOf(value, 1), region);
    copyShifted(writer, operandOf(value, 0), into, 1, region);
    region.code.push(`${into}[0] = ${first};`);
  } else if (!found && operation.is === "call" && operation.name === "append") {
    const last = writer.number(operandOf(value, 1), region);
    copyShifted(writer, operandOf(value, 0), into, 0, region);
    region.code.push(`${into}[${writer.length(lengthOf(operandOf(value, 0)))}] = ${last};`);
  } else {
    writeLoop(writer, length, region, (loop) => {
      const element =
        value.length && !found ? computeElement(writer, value, loop) : elementOf(writer, value, loop);
      loop.code.push(`${into}[${loop.index}] = ${element};`);
    });
  }
}

function fillSelected(
  writer: FunctionWriter,
  value: Value,
  into: string,
  region: Region,
  length: ListLength,
): void {
  const condition = writer.condition(operandOf(value, 0), region);
  const sides = [operandOf(value, 1), operandOf(value, 2)].map((side) => {
    const branch = Region.branch(region);
    fillList(writer, side, into, branch, length);
    writer.flush(branch);
    return branch.code;
  });
  const [yes = [], no = []] = sides;
  region.code.push(`if (${condition}) {`, ...yes, "} else {", ...no, "}");
}

function copyShifted(writer: FunctionWriter, list: Value, into: string, shift: number, region: Region): void {
  writeLoop(writer, lengthOf(list), region, (loop) => {
    const place = shift === 0 ? loop.index : `${loop.index} + ${shift}`;
    loop.code.push(`${into}[${place}] = ${elementOf(writer, list, loop)};`);
  });
}

/** Writes a loop over the places of a list; `body` fills it. */
export function writeLoop(
  writer: FunctionWriter,
  length: ListLength,
  region: Region,
  body: (loop: Region) => void,
): void {
  const index = writer.module.name("i");
  const loop = Region.loop(region, index, length);
  const n = writer.length(length);
  body(loop);
  region.code.push(`for (let ${index} = 0; ${index} < ${n}; ${index} = ${index} + 1) {`, ...loop.code, "}");
}

/** Element of the list at the loop's place (or the number itself): a literal, a register or a reading of a buffer. */
export function elementOf(writer: FunctionWriter, value: Value, loop: Region): string {
  const region = loop.ofNumbers;
  if (!value.length) return writer.number(value, region);
  const register = loop.registers.get(value.id);
  if (register !== undefined) return register;
  checkLength(writer, value.length, loop);
  const buffer = region.find(value.id);
  if (buffer !== undefined) return remember(writer, value, `${buffer}[${loop.index}]`, loop);
  const operation = value.operation;
  const unvarying = value.still && region.outermost(value.free) !== region;
  const isView = operation.is === "call" && views.has(operation.name);
  const fused =
    isView || operation.is === "column-option-field" || (value.uses <= 1 && !unvarying && fuses(value));
  if (fused) return computeElement(writer, value, loop);
  return remember(writer, value, `${writer.list(value, region)}[${loop.index}]`, loop);
}

function remember(writer: FunctionWriter, value: Value, expression: string, loop: Region): string {
  const register = writer.assign(loop, "e", expression);
  loop.registers.set(value.id, register);
  return register;
}

/** Whether the elements can be computed one by one in the loop of whatever reads the list. */
function fuses(value: Value): boolean {
  const operation = value.operation;
  switch (operation.is) {
    case "negate":
    case "arithmetic":
    case "judged":
    case "after":
    case "property":
      return true;
    case "call":
      return (
        isScalarFunction(operation.name) || operation.name === "cumsum" || operation.name === "interpolate"
      );
    default:
      return false;
  }
}

function computeElement(writer: FunctionWriter, value: Value, loop: Region): string {
  const region = loop.ofNumbers;
  const operation = value.operation;
  switch (operation.is) {
    case "column":
    case "line":
    case "bound":
    case "select":
    case "form":
      return elementOf(writer, value, loop);
    case "column-option-field": {
      const table = writer.module.optionTable(operation.values);
      return remember(
        writer,
        value,
        `${table}[${writer.choiceColumn(operation.choiceColumn)}[${loop.index}]]`,
        loop,
      );
    }
    case "judged": {
      const element = elementOf(writer, operandOf(value, 0), loop);
      const sum = writer.module.name("s");
      region.code.push(`let ${sum} = 0;`);
      loop.code.push(`${sum} = ${sum} + ${element};`);
      writer.judge(sum, region);
      loop.registers.set(value.id, element);
      return element;
    }
    case "after":
      for (const other of value.operands.slice(1)) {
        if (other.length) writer.list(other, region);
        else writer.number(other, region);
      }
      return elementOf(writer, operandOf(value, 0), loop);
    case "call":
      if (!isScalarFunction(operation.name)) return computeListElement(writer, value, operation.name, loop);
      break;
  }
  const operands = value.operands.map((operand) => elementOf(writer, operand, loop));
  return remember(writer, value, emitOperation(writer, value, operands, loop), loop);
}

function computeListElement(writer: FunctionWriter, value: Value, name: string, loop: Region): string {
  const region = loop.ofNumbers;
  const list = operandOf(value, 0);
  switch (name) {
    case "cumsum": {
      const element = elementOf(writer, list, loop);
      const sum = writer.module.name("s");
      region.code.push(`let ${sum} = 0;`);
      loop.code.push(`${sum} = ${sum} + ${element};`);
      return remember(writer, value, sum, loop);
    }
    case "drop_first":
    case "drop_last": {
      const buffer = writer.list(list, region);
      if (lengthOf(value).plus < 0) {
        writer.faults++;
        region.code.push(`requireLength(${writer.length(lengthOf(value))});`);
      }
      return remember(writer, value, `${buffer}[${loop.index}${name === "drop_first" ? " + 1" : ""}]`, loop);
    }
    case "reverse": {
      const n = writer.length(lengthOf(list));
      return remember(writer, value, `${writer.list(list, region)}[${n} - 1 - ${loop.index}]`, loop);
    }
    case "interpolate": {
      writer.faults++;
      const x = elementOf(writer, list, loop);
      return remember(writer, value, interpolation(writer, value, x, region), loop);
    }
    case "prepend":
    case "append":
      return elementOf(writer, value, loop);
    default:
      throw new Error(`${name} is not computed element by element.`);
  }
}

function interpolation(writer: FunctionWriter, value: Value, x: string, region: Region): string {
  const [xs, ys] = [operandOf(value, 1), operandOf(value, 2)];
  const n = writer.length(lengthOf(xs));
  if (lengthKey(lengthOf(xs)) !== lengthKey(lengthOf(ys))) {
    region.code.push(`sameLength(${n}, ${writer.length(lengthOf(ys))});`);
  }
  return `interpolateLinear(${x}, ${writer.list(xs, region)}, ${writer.list(ys, region)}, ${n})`;
}

/** Lists of one loop must have its length; lengths that differ in form are compared in the run. */
function checkLength(writer: FunctionWriter, length: ListLength, loop: Region): void {
  if (!loop.length || lengthKey(length) === lengthKey(loop.length)) return;
  writer.faults++;
  loop.ofNumbers.code.push(`sameLength(${writer.length(loop.length)}, ${writer.length(length)});`);
}

/** Code for a number made of a list: writes the loop and answers a register. */
export function emitReduction(writer: FunctionWriter, value: Value, region: Region): string {
  const operation = value.operation;
  if (operation.is !== "call") throw new Error(`${operation.is} does not reduce a list.`);
  const list = operandOf(value, 0);
  const fold = (start: string, step: (sum: string, element: string) => string): string => {
    const sum = writer.module.name("s");
    region.code.push(`let ${sum} = ${start};`);
    writeLoop(writer, lengthOf(list), region, (loop) => {
      loop.code.push(`${sum} = ${step(sum, elementOf(writer, list, loop))};`);
    });
    return sum;
  };
  switch (operation.name) {
    case "sum":
      return writer.assign(
        region,
        "r",
        fold("0", (sum, element) => `${sum} + ${element}`),
      );
    case "product":
      return writer.assign(
        region,
        "r",
        fold("1", (sum, element) => `${sum} * ${element}`),
      );
    case "min":
      return writer.assign(
        region,
        "r",
        fold("(1 / 0)", (sum, element) => `Math.min(${sum}, ${element})`),
      );
    case "max":
      return writer.assign(
        region,
        "r",
        fold("(-1 / 0)", (sum, element) => `Math.max(${sum}, ${element})`),
      );
    case "mean": {
      const sum = fold("0", (so, element) => `${so} + ${element}`);
      return writer.assign(region, "r", `${sum} / ${writer.length(lengthOf(list))}`);
    }
    default:
      return pick(writer, value, operation.name, region);
  }
}

function pick(writer: FunctionWriter, value: Value, name: string, region: Region): string {
  const list = operandOf(value, 0);
  switch (name) {
    case "count": {
      if (!list.still) writer.list(list, region);
      return writer.assign(region, "r", writer.length(lengthOf(list)));
    }
    case "first":
    case "last": {
      writer.faults++;
      const buffer = writer.list(list, region);
      const n = writer.length(lengthOf(list));
      region.code.push(`requireElements(${n});`);
      return writer.assign(region, "r", `${buffer}[${name === "first" ? "0" : `${n} - 1`}]`);
    }
    case "at": {
      writer.faults++;
      const buffer = writer.list(list, region);
      const place = writer.number(operandOf(value, 1), region);
      return writer.assign(region, "r", `elementAt(${buffer}, ${writer.length(lengthOf(list))}, ${place})`);
    }
    case "interpolate": {
      writer.faults++;
      const x = writer.number(list, region);
      return writer.assign(region, "r", interpolation(writer, value, x, region));
    }
    case "weighted_mean":
      return weightedMean(writer, value, region);
    default:
      throw new Error(`The function ${name} has no code.`);
  }
}

function weightedMean(writer: FunctionWriter, value: Value, region: Region): string {
  const [xs, weights] = [operandOf(value, 0), operandOf(value, 1)];
  const [sum, weight] = [writer.module.name("s"), writer.module.name("s")];
  region.code.push(`let ${sum} = 0;`, `let ${weight} = 0;`);
  writeLoop(writer, lengthOf(xs), region, (loop) => {
    const w = elementOf(writer, weights, loop);
    const x = elementOf(writer, xs, loop);
    loop.code.push(`${sum} = ${sum} + ${x} * ${w};`, `${weight} = ${weight} + ${w};`);
  });
  return writer.assign(region, "r", `${sum} / ${weight}`);
}
