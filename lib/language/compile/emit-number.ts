import { isScalarFunction, mathNames } from "../runtime/scalar";
import { emitForm } from "./emit-form";
import { emitReduction } from "./emit-reduction";
import type { FunctionWriter } from "./function-writer";
import { numberLiteral } from "./module-writer";
import { Region } from "./region";
import type { Operation, Value } from "./value";

/** Largest whole exponent written as multiplications: x³ is x·x·x, within 1 ulp a factor, where `Math.pow` is slower. */
const longestChain = 8;

/** Code for a number: writes what it needs and answers a literal or a register. */
export function emitNumber(writer: FunctionWriter, value: Value, from: Region): string {
  const operation = value.operation;
  if (operation.is === "constant") return numberLiteral(operation.value);
  const here = from.ofNumbers;
  const found = here.find(value.id);
  if (found !== undefined) return found;
  const region = value.still ? here.outermost(value.free, value.light && value.uses > 1) : here;
  const register = compute(writer, value, region);
  region.registers.set(value.id, register);
  return register;
}

function compute(writer: FunctionWriter, value: Value, region: Region): string {
  const operation = value.operation;
  const operand = (index: number): Value => operandOf(value, index);
  switch (operation.is) {
    case "input":
      return writer.input(operation.index);
    case "line":
      return writer.lineNumber(operation.index);
    case "option-field":
      return writer.assign(
        region,
        "r",
        `${writer.module.optionTable(operation.values)}[${writer.choice(operation.choice)}]`,
      );
    case "judged": {
      const inner = operand(0);
      const register = writer.number(inner, region);
      // A value that does not vary in a body is judged once, outside of it, when the body is surely evaluated.
      let judging = region;
      while (
        judging.kind === "body" &&
        judging.always &&
        judging.parent &&
        !judging.registers.has(inner.id) &&
        judging.parent.find(inner.id) !== undefined
      ) {
        judging = judging.parent;
      }
      if (inner.operation.is !== "constant") writer.judge(register, judging);
      return register;
    }
    case "after":
      for (const other of value.operands.slice(1)) {
        if (other.length) writer.list(other, region);
        else writer.number(other, region);
      }
      return writer.number(operand(0), region);
    case "select":
      return select(writer, value, region);
    case "form":
      return emitForm(writer, value, operation, region);
    case "call":
      if (!isScalarFunction(operation.name) || operand(0).length) return emitReduction(writer, value, region);
      break;
    case "constant":
    case "bound":
    case "column":
    case "column-option-field":
    case "option-test":
    case "comparison":
    case "not":
    case "logic":
      throw new Error(`A number was expected, not ${operation.is}.`);
  }
  const operands = value.operands.map((each) => writer.number(each, region));
  return writer.assign(region, "r", emitOperation(writer, value, operands, region));
}

function operandOf(value: Value, index: number): Value {
  const operand = value.operands[index];
  if (!operand) throw new Error(`${value.operation.is} lacks operand ${index}.`);
  return operand;
}

/** Expression of one operation on numbers (or on elements, in a loop) whose operands are literals or registers. */
export function emitOperation(
  writer: FunctionWriter,
  value: Value,
  operands: readonly string[],
  region: Region,
): string {
  const operation = value.operation;
  const [a = "", b = ""] = operands;
  switch (operation.is) {
    case "negate":
      return `-${a}`;
    case "arithmetic":
      return operation.operator === "^"
        ? emitPower(writer, a, b, operandOf(value, 1).operation, region)
        : `${a} ${operation.operator} ${b}`;
    case "call":
      return emitCall(operation.name, operands);
    case "property": {
      writer.faults++;
      const index = operation.material.from === "column" ? `[${region.index}]` : "";
      const reader = `${writer.material(operation.material)}${index}`;
      return `${reader}.${operation.operation}("${operation.property}", ${operands.join(", ")}, ${writer.judgedFlag})`;
    }
    default:
      throw new Error(`${operation.is} is not an operation on numbers.`);
  }
}

function emitCall(name: string, operands: readonly string[]): string {
  if (!isScalarFunction(name)) throw new Error(`${name} does not act on numbers.`);
  if (operands.length === 1 && (name === "min" || name === "max" || name === "mean")) return operands[0]!;
  if (name === "mean") return `(${operands.join(" + ")}) / ${operands.length}`;
  const math = mathNames[name];
  return `${math ? `Math.${math}` : name}(${operands.join(", ")})`;
}

function emitPower(
  writer: FunctionWriter,
  base: string,
  exponent: string,
  operation: Operation,
  region: Region,
): string {
  if (operation.is !== "constant" || operation.value === 0) return `power(${base}, ${exponent})`;
  const wanted = Math.abs(operation.value);
  const whole = Math.floor(wanted);
  const rest = wanted - whole;
  if (whole > longestChain || (rest !== 0 && rest !== 0.5)) return `Math.pow(${base}, ${exponent})`;
  let result = whole > 0 ? chain(writer, base, whole, region) : "";
  if (rest === 0.5) result = result ? `${result} * Math.sqrt(${base})` : `Math.sqrt(${base})`;
  return operation.value < 0 ? `1 / (${result})` : result;
}

/** base^n, n ≥ 1, by squaring. */
function chain(writer: FunctionWriter, base: string, n: number, region: Region): string {
  if (n === 1) return base;
  if (n % 2 === 1) return `${chain(writer, base, n - 1, region)} * ${base}`;
  if (n === 2) return `${base} * ${base}`;
  const half = writer.assign(region, region.kind === "loop" ? "e" : "r", chain(writer, base, n / 2, region));
  return `${half} * ${half}`;
}

function select(writer: FunctionWriter, value: Value, region: Region): string {
  const condition = writer.condition(operandOf(value, 0), region);
  const isCondition = isConditionValue(operandOf(value, 1));
  // What both sides compute in any case is computed once, in front.
  const [always, alsoAlways] = [evaluated(operandOf(value, 1)), evaluated(operandOf(value, 2))];
  const common = [...always].filter((each) => alsoAlways.has(each) && !each.length);
  for (const each of common.sort((a, b) => a.id - b.id)) writer.number(each, region);
  const sides = [operandOf(value, 1), operandOf(value, 2)].map((side) => {
    const branch = Region.branch(region);
    const result = isCondition ? writer.condition(side, branch) : writer.number(side, branch);
    writer.flush(branch);
    return { code: branch.code, result };
  });
  const [yes, no] = sides as [(typeof sides)[number], (typeof sides)[number]];
  if (yes.code.length === 0 && no.code.length === 0) {
    return writer.assign(region, "r", `${condition} ? ${yes.result} : ${no.result}`);
  }
  const name = writer.module.name("r");
  region.code.push(
    `let ${name};`,
    `if (${condition}) {`,
    ...yes.code,
    `${name} = ${yes.result};`,
    "} else {",
    ...no.code,
    `${name} = ${no.result};`,
    "}",
  );
  return name;
}

const mostEvaluated = 300;

/** The numbers and lists, short of `mostEvaluated`, that are computed whenever the value is. */
function evaluated(value: Value, into = new Set<Value>()): Set<Value> {
  if (into.has(value) || into.size >= mostEvaluated) return into;
  const { is } = value.operation;
  if (is !== "constant" && !isConditionValue(value)) into.add(value);
  const sure =
    is === "select" || is === "logic"
      ? value.operands.slice(0, 1)
      : is === "form"
        ? value.operands.slice(0, -1)
        : value.operands;
  for (const operand of sure) evaluated(operand, into);
  return into;
}

function isConditionValue(value: Value): boolean {
  const is = value.operation.is;
  return (
    is === "comparison" ||
    is === "logic" ||
    is === "not" ||
    is === "option-test" ||
    (is === "select" && isConditionValue(operandOf(value, 1)))
  );
}

/** Code for a condition: answers an expression. */
export function emitCondition(writer: FunctionWriter, value: Value, region: Region): string {
  const operation = value.operation;
  switch (operation.is) {
    case "option-test":
      return `(${writer.choice(operation.choice)} ${operation.equal ? "===" : "!=="} ${operation.option})`;
    case "not":
      return `!${writer.condition(operandOf(value, 0), region)}`;
    case "comparison":
      return comparison(writer, value, operation, region);
    case "logic":
      return logic(writer, value, operation.operator, region);
    case "select":
      return select(writer, value, region);
    default:
      throw new Error(`A condition was expected, not ${operation.is}.`);
  }
}

const tolerantNames = {
  "==": "equalTo",
  "!=": "unequalTo",
  "<": "below",
  "<=": "atMost",
  ">": "above",
  ">=": "atLeast",
} as const;
export type TolerantName = (typeof tolerantNames)[keyof typeof tolerantNames];

const opposite = { "<": ">=", "<=": ">", ">": "<=", ">=": "<" } as const;

/** A comparison with something that is not a number is a fault, not an answer. Its price is paid on `false` only. */
function comparison(
  writer: FunctionWriter,
  value: Value,
  operation: Extract<Operation, { is: "comparison" }>,
  region: Region,
): string {
  const [left, right] = [operandOf(value, 0), operandOf(value, 1)];
  const a = writer.number(left, region);
  const b = writer.number(right, region);
  const { operator } = operation;
  const known = [left, right].every(
    (side) => side.operation.is === "input" || side.operation.is === "constant",
  );
  const { from, to } = writer.range;
  const unknown = `N(F, ${numberLiteral(from)}, ${numberLiteral(to)})`;
  if (!known) {
    writer.faults++;
    writer.judgements++;
  }
  const plain = operation.tolerant
    ? `${tolerantNames[operator]}(${a}, ${b})`
    : operator === "==" || operator === "!="
      ? `${a} ${operator}= ${b}`
      : `${a} ${operator} ${b}`;
  if (known) return `(${plain})`;
  if (operator === "==" || operator === "!=" || operation.tolerant) {
    return `(${a} === ${a} && ${b} === ${b} ? ${plain} : ${unknown})`;
  }
  return `(${plain} || !(${a} ${opposite[operator]} ${b}) && ${unknown})`;
}

function logic(writer: FunctionWriter, value: Value, operator: "and" | "or", region: Region): string {
  const left = writer.condition(operandOf(value, 0), region);
  const branch = Region.branch(region);
  const right = writer.condition(operandOf(value, 1), branch);
  writer.flush(branch);
  if (branch.code.length === 0) return `(${left} ${operator === "and" ? "&&" : "||"} ${right})`;
  const name = writer.module.name("c");
  region.code.push(
    `let ${name} = ${left};`,
    `if (${operator === "and" ? name : `!${name}`}) {`,
    ...branch.code,
    `${name} = ${right};`,
    "}",
  );
  return name;
}
