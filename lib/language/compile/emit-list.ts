import { isScalarFunction } from "../runtime/scalar";
import type { ListLength } from "../types";
import { emitOperation } from "./emit-number";
import { emitListForm } from "./emit-form";
import type { FunctionWriter } from "./function-writer";
import { Region } from "./region";
import { lengthKey, type Value } from "./value";

/** Functions that show the elements of another list in another order, without copying. */
const views: ReadonlySet<string> = new Set(["drop_first", "drop_last", "reverse"]);

export function operandOf(value: Value, index: number): Value {
  const operand = value.operands[index];
  if (!operand) throw new Error(`${value.operation.is} lacks operand ${index}.`);
  return operand;
}

export function lengthOf(value: Value): ListLength {
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
  const judged = value.operation.is === "judged";
  const extended = judged ? operandOf(value, 0) : value;
  if (region.find(extended.id) !== undefined) {
    fillByElement(writer, value, into, region, length);
  } else if (isCall(extended, "prepend") || isCall(extended, "append")) {
    fillExtended(writer, extended, into, judged, region);
  } else if (value.operation.is === "select") {
    fillSelected(writer, value, into, region, length);
  } else if (value.operation.is === "form") {
    emitListForm(writer, value, value.operation, into, region);
  } else {
    fillByElement(writer, value, into, region, length);
  }
}

function isCall(value: Value, name: string): boolean {
  return value.operation.is === "call" && value.operation.name === name;
}

function fillByElement(
  writer: FunctionWriter,
  value: Value,
  into: string,
  region: Region,
  length: ListLength,
): void {
  const compute = value.length && region.find(value.id) === undefined ? computeElement : elementOf;
  writeLoop(writer, length, region, (loop) => {
    loop.code.push(`${into}[${loop.index}] = ${compute(writer, value, loop)};`);
  });
}

/** A list with one more element at its beginning or end, written without another copy. */
function fillExtended(
  writer: FunctionWriter,
  value: Value,
  into: string,
  judged: boolean,
  region: Region,
): void {
  const list = operandOf(value, 0);
  const added = writer.number(operandOf(value, 1), region);
  const first = isCall(value, "prepend");
  writeLoop(writer, lengthOf(list), region, (loop) => {
    const element = elementOf(writer, list, loop);
    if (judged) judgeElement(writer, element, loop);
    loop.code.push(`${into}[${loop.index}${first ? " + 1" : ""}] = ${element};`);
  });
  if (judged && operandOf(value, 1).operation.is !== "constant") writer.judge(added, region);
  region.code.push(`${into}[${first ? "0" : writer.length(lengthOf(list))}] = ${added};`);
}

/** Adds the element to a sum in front of the loop, which is judged after it. */
function judgeElement(writer: FunctionWriter, element: string, loop: Region): void {
  const region = loop.ofNumbers;
  const sum = writer.module.name("s");
  region.code.push(`let ${sum} = 0;`);
  loop.code.push(`${sum} = ${sum} + ${element};`);
  writer.judge(sum, region);
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
  requireSameLength(value.length, loop.length);
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
      judgeElement(writer, element, loop);
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

/** The checker refuses lists of different length; here one would read beyond its end. */
function requireSameLength(one: ListLength, other: ListLength | null): void {
  if (!other || lengthKey(one) !== lengthKey(other)) {
    throw new Error("Lists of different length reached the compiler.");
  }
}

/** Expression of `interpolate` at one place; its points are buffers. */
export function interpolation(writer: FunctionWriter, value: Value, x: string, region: Region): string {
  const [xs, ys] = [operandOf(value, 1), operandOf(value, 2)];
  const n = writer.length(lengthOf(xs));
  requireSameLength(lengthOf(xs), ys.length);
  return `interpolateLinear(${x}, ${writer.list(xs, region)}, ${writer.list(ys, region)}, ${n})`;
}
