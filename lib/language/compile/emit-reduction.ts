import { elementOf, interpolation, lengthOf, operandOf, writeLoop } from "./emit-list";
import type { FunctionWriter } from "./function-writer";
import type { Region } from "./region";
import type { Value } from "./value";

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
      const buffer = writer.list(list, region);
      const n = writer.length(lengthOf(list));
      if (lengthOf(list).plus < 1) {
        writer.faults++;
        region.code.push(`requireElements(${n});`);
      }
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
