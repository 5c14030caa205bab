import { CostMeter } from "./cost";
import type { Site } from "./graph";
import type { TypedProgram } from "../types";

/** What the generated functions of one program share: names, room for lists, tables of options, sites, costs. */
export class ModuleWriter {
  private names = 0;
  /** Declarations in front of the functions. */
  readonly declarations: string[] = [];
  readonly sites: Site[] = [];
  readonly costs: CostMeter;
  private readonly tables = new Map<string, string>();

  constructor(readonly program: TypedProgram) {
    this.costs = new CostMeter(program);
  }

  name(prefix: string): string {
    return `${prefix}${this.names++}`;
  }

  /** Name of a module-wide buffer, which grows to the longest list it has held. */
  buffer(): string {
    const name = this.name("B");
    this.declarations.push(`let ${name} = new Float64Array(0);`);
    return name;
  }

  /** Name of the SI values of the options of a choice. */
  optionTable(values: readonly number[]): string {
    const literal = values.map(numberLiteral).join(", ");
    const known = this.tables.get(literal);
    if (known) return known;
    const name = this.name("K");
    this.declarations.push(`const ${name} = new Float64Array([${literal}]);`);
    this.tables.set(literal, name);
    return name;
  }
}

/** JavaScript literal with the same bits. */
export function numberLiteral(value: number): string {
  if (value !== value) return "NaN";
  if (value === Infinity) return "(1 / 0)";
  if (value === -Infinity) return "(-1 / 0)";
  return value < 0 || Object.is(value, -0) ? `(-${String(-value)})` : String(value);
}
