import type { Cost } from "./cost";
import type { FunctionWriter } from "./function-writer";
import { Region } from "./region";
import type { Operation, Value } from "./value";

type FormOperation = Extract<Operation, { is: "form" }>;

/** Code for a special form whose value is a number; answers its register. */
export function emitForm(
  writer: FunctionWriter,
  value: Value,
  operation: FormOperation,
  region: Region,
): string {
  writer.forms++;
  writer.faults++;
  switch (operation.form) {
    case "balance":
    case "argmin": {
      const ends = endsOf(writer, value, region);
      return solve(writer, value, operation, region, (body) => {
        return `X.${operation.form}(${operation.site}, ${body}, ${ends.lower}, ${ends.upper})`;
      });
    }
    case "integral": {
      const ends = endsOf(writer, value, region);
      const body = writeBody(writer, value, operation, region);
      return writer.assign(
        region,
        "r",
        `X.integral(${operation.site}, ${body}, ${ends.lower}, ${ends.upper})`,
      );
    }
    case "fixed-point": {
      const start = writer.number(operandOf(value, 0), region);
      return solve(writer, value, operation, region, (body) => `X.fixedPointNumber(${body}, ${start})`);
    }
    case "series":
      return writeSeries(writer, value, operation, region);
  }
}

/** The same for a fixed point of lists, written into a buffer. */
export function emitListForm(
  writer: FunctionWriter,
  value: Value,
  operation: FormOperation,
  into: string,
  region: Region,
): void {
  writer.forms++;
  writer.faults++;
  const length = value.length;
  if (!length) throw new Error("A number has no list.");
  if (operation.form !== "fixed-point") throw new Error(`${operation.form} has a number for its value.`);
  const start = writer.list(operandOf(value, 0), region);
  const room = writer.room(length);
  const solver = (body: string): string =>
    `X.fixedPointList(${body}, ${start}, ${writer.length(length)}, ${room}, ${into})`;
  solve(writer, value, operation, region, solver, into);
}

function operandOf(value: Value, index: number): Value {
  const operand = value.operands[index];
  if (!operand) throw new Error(`A special form lacks operand ${index}.`);
  return operand;
}

function bodyOf(value: Value): Value {
  return operandOf(value, value.operands.length - 1);
}

function endsOf(writer: FunctionWriter, value: Value, region: Region): { lower: string; upper: string } {
  return {
    lower: writer.number(operandOf(value, 0), region),
    upper: writer.number(operandOf(value, 1), region),
  };
}

function charge(writer: FunctionWriter, operation: FormOperation): string {
  const site = writer.module.sites[operation.site];
  if (!site) throw new Error("A special form has no site.");
  return `if ((U = U - ${costExpression(writer, writer.module.costs.of(site.form.body))}) < 0) budgetExceeded();`;
}

function costExpression(writer: FunctionWriter, cost: Cost): string {
  const terms = [String(cost.fixed)];
  for (const { length, amount } of cost.perElement.values())
    terms.push(`${amount} * ${writer.length(length)}`);
  return terms.length === 1 ? terms[0]! : `(${terms.join(" + ")})`;
}

/** Writes the body as a function of its variable and answers the function's name. */
function writeBody(writer: FunctionWriter, value: Value, operation: FormOperation, region: Region): string {
  const bound = operation.bound;
  const body = Region.body(region, bound.free, true);
  const variable = writer.module.name(bound.length ? "b" : "x");
  body.registers.set(bound.id, variable);
  body.code.push(charge(writer, operation));
  const result = bound.length ? writer.list(bodyOf(value), body) : writer.number(bodyOf(value), body);
  writer.flush(body);
  const name = writer.module.name("f");
  region.code.push(`const ${name} = (${variable}) => {`, ...body.code, `return ${result};`, "};");
  return name;
}

/**
 * While a solver iterates, nothing is judged and properties answer with the end of their range; the evaluation at the
 * solution is judged. It is repeated for that only where a property is read or a call was not finite on the way.
 * @param into buffer that receives the solution when it is a list; else the solution's register is answered
 */
function solve(
  writer: FunctionWriter,
  value: Value,
  operation: FormOperation,
  region: Region,
  solver: (body: string) => string,
  into: string | null = null,
): string {
  const judgementsBefore = writer.judgements;
  writer.unjudged++;
  const body = writeBody(writer, value, operation, region);
  writer.unjudged--;
  const run = (): string => {
    if (into === null) return writer.assign(region, "r", solver(body));
    region.code.push(`${solver(body)};`);
    return into;
  };
  const { reads } = bodyOf(value);
  if (!reads && writer.judgements === judgementsBefore) return run();
  const outer = writer.unjudged > 0 ? writer.assign(region, "j", "J") : null;
  region.code.push("J = false;", outer === null ? "Z = false;" : `if (${outer}) Z = false;`);
  const solution = run();
  region.code.push(`J = ${outer ?? "true"};`);
  const repeated = [outer, reads ? null : "Z"].filter((condition) => condition !== null).join(" && ");
  region.code.push(`${repeated ? `if (${repeated}) ` : ""}${body}(${solution});`);
  return solution;
}

function writeSeries(writer: FunctionWriter, value: Value, operation: FormOperation, region: Region): string {
  const [from, to] = [0, 1].map((index) => {
    const end = operandOf(value, index);
    const register = writer.number(end, region);
    return end.operation.is === "constant" && Number.isInteger(end.operation.value)
      ? register
      : writer.assign(region, "r", `wholeBound(${register})`);
  });
  const body = Region.body(region, operation.bound.free, false);
  const variable = writer.module.name("x");
  body.registers.set(operation.bound.id, variable);
  body.code.push(charge(writer, operation));
  const term = writer.number(bodyOf(value), body);
  writer.flush(body);
  const sum = writer.module.name("s");
  region.code.push(
    `let ${sum} = 0;`,
    `for (let ${variable} = ${from}; ${variable} <= ${to}; ${variable} = ${variable} + 1) {`,
    ...body.code,
    `${sum} = ${sum} + ${term};`,
    "}",
  );
  return writer.assign(region, "r", sum);
}
