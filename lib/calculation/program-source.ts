import type { ColumnDeclaration, ConditionSource, InputDeclaration, ProgramSource } from "@/lib/language";
import type { Column, Definition, Figure, Input } from "./definition";
import { messageSymbols } from "./message-text";

function columnDeclaration(column: Column): ColumnDeclaration {
  const { symbol, label } = column;
  switch (column.kind) {
    case "number":
      return { kind: "number", symbol, label, quantity: column.quantity, unit: column.unit };
    case "choice":
      return {
        kind: "choice",
        symbol,
        label,
        options: column.options.map(({ key, values }) => ({ key, values: values ?? {} })),
      };
    case "material":
      return { kind: "material", symbol, label, needs: column.needs };
    case "text":
      return { kind: "text", symbol, label };
  }
}

function inputDeclaration(input: Input): InputDeclaration {
  if (input.kind === "table") {
    const { kind, symbol, label, columns, minRows, maxRows } = input;
    return { kind, symbol, label, columns: columns.map(columnDeclaration), minRows, maxRows };
  }
  switch (input.kind) {
    case "number":
      return {
        kind: "number",
        symbol: input.symbol,
        label: input.label,
        quantity: input.quantity,
        unit: input.unit,
      };
    case "choice":
      return {
        kind: "choice",
        symbol: input.symbol,
        label: input.label,
        options: input.options.map(({ key, values }) => ({ key, values: values ?? {} })),
      };
    case "material":
      return { kind: "material", symbol: input.symbol, label: input.label, needs: input.needs };
  }
}

function conditionsOf(definition: Definition): ConditionSource[] {
  return [
    ...definition.inputs.flatMap((input, i): ConditionSource[] =>
      input.appliesWhen === undefined
        ? []
        : [
            {
              role: "applies-when",
              owner: input.symbol,
              path: `#/inputs/${i}/appliesWhen`,
              text: input.appliesWhen,
            },
          ],
    ),
    ...definition.requires.map(({ that }, i): ConditionSource => ({
      role: "requires",
      owner: i,
      path: `#/requires/${i}/that`,
      text: that,
    })),
    ...definition.limits.map(({ when }, i): ConditionSource => ({
      role: "limit",
      owner: i,
      path: `#/limits/${i}/when`,
      text: when,
    })),
  ];
}

/** What a member of a figure names. */
export interface FigureSymbol {
  readonly symbol: string;
  readonly path: string;
  /** `list`: one value for each layer or face; `input`: something that can be varied. */
  readonly wants: "number" | "list" | "any" | "number-input" | "table";
}

function layersOf(figure: Extract<Figure, { kind: "section" }>): {
  table: string | null;
  symbols: [string, string][];
} {
  if (typeof figure.layers === "string") return { table: figure.layers, symbols: [] };
  return {
    table: null,
    symbols: figure.layers.flatMap(({ thickness, conductivity }, i): [string, string][] => [
      [thickness, `layers/${i}/thickness`],
      ...(conductivity === undefined ? [] : [[conductivity, `layers/${i}/conductivity`] as [string, string]]),
    ]),
  };
}

const lists: ReadonlySet<string> = new Set(["temperatures"]);

/** Every symbol that a figure reads, except columns of the table that it draws. */
export function figureSymbols(figure: Figure, index: number, inputs: readonly Input[]): FigureSymbol[] {
  const base = `#/figures/${index}`;
  const found: FigureSymbol[] = [];
  const add = (symbol: string | undefined, member: string, wants: FigureSymbol["wants"]) => {
    if (symbol !== undefined) found.push({ symbol, path: `${base}/${member}`, wants });
  };
  if (figure.kind === "curve") {
    add(figure.x.symbol, "x/symbol", "number-input");
    figure.y.forEach((symbol, i) => add(symbol, `y/${i}`, "number"));
    return found;
  }
  const tableName =
    figure.kind === "section" ? layersOf(figure).table : figure.kind === "stack" ? figure.layers : null;
  const table = inputs.find((input) => input.kind === "table" && input.symbol === tableName);
  const columns = new Set(table?.kind === "table" ? table.columns.map(({ symbol }) => symbol) : []);
  if (figure.kind === "section") {
    for (const [symbol, member] of layersOf(figure).symbols) add(symbol, member, "number");
  }
  for (const [member, value] of Object.entries(figure)) {
    if (member === "kind" || member === "title" || member === "shape") continue;
    if (member === "layers") {
      if (typeof value === "string") add(value, member, "table");
    } else if (Array.isArray(value)) {
      value.forEach((symbol, i) => {
        if (typeof symbol === "string") add(symbol, `${member}/${i}`, "number");
      });
    } else if (typeof value === "string") {
      if (columns.has(value)) continue;
      const perLayer = tableName !== null && ["thickness", "conductivity", "names", "area"].includes(member);
      const place = figure.kind === "profile" && member === "place";
      add(value, member, lists.has(member) || perLayer ? "list" : place ? "number-input" : "number");
    }
  }
  return found;
}

/** What the working of a definition is checked against. */
export function programSource(definition: Definition): ProgramSource {
  const uses: { symbol: string; path: string }[] = [];
  definition.limits.forEach((limit, i) => {
    for (const symbol of messageSymbols(limit.label)) uses.push({ symbol, path: `#/limits/${i}/label` });
    for (const symbol of messageSymbols(limit.message)) uses.push({ symbol, path: `#/limits/${i}/message` });
  });
  definition.figures.forEach((figure, i) => {
    for (const { symbol, path } of figureSymbols(figure, i, definition.inputs)) uses.push({ symbol, path });
  });
  return {
    inputs: definition.inputs.map(inputDeclaration),
    working: definition.working,
    conditions: conditionsOf(definition),
    results: definition.results.map(({ symbol, quantity, unit, list }, i) => ({
      symbol,
      quantity,
      unit,
      list: list ?? false,
      path: `#/results/${i}`,
    })),
    uses,
  };
}
