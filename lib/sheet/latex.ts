import { languageFunctions, type Expression } from "@/lib/language";

/** LaTeX of a working's expressions, for KaTeX. Pure; escapes everything that comes from a definition's text. */

const greek = new Set(
  "alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi pi rho sigma tau phi chi psi omega Gamma Delta Theta Lambda Xi Pi Sigma Phi Psi Omega".split(
    " ",
  ),
);

const subscripts: Record<string, string> = { inf: "\\infty" };

export function escapeLatex(text: string): string {
  return text.replace(/[\\{}$&#%_^~]/g, (character) => {
    if (character === "\\") return "\\textbackslash{}";
    if (character === "^" || character === "~") return `\\${character}{}`;
    return `\\${character}`;
  });
}

function baseName(name: string): string {
  if (name === "eps") return "\\varepsilon";
  if (greek.has(name)) return `\\${name}`;
  return name.length === 1 ? name : `\\mathrm{${escapeLatex(name)}}`;
}

/** `T_surface` as T with an upright subscript; Greek by its English name. */
export function symbolLatex(symbol: string): string {
  const [base = "", ...rest] = symbol.split("_");
  const digits = /^([A-Za-z]+?)(\d+)$/.exec(base);
  const head = digits?.[1] && digits[1].length === 1 ? digits[1] : base;
  const parts = [...(head === base ? [] : [digits?.[2] ?? ""]), ...rest].filter((part) => part !== "");
  if (parts.length === 0) return baseName(head);
  const subscript = parts
    .map((part) => subscripts[part] ?? (greek.has(part) ? `\\${part}` : `\\text{${escapeLatex(part)}}`))
    .join(",");
  return `${baseName(head)}_{${subscript}}`;
}

const levels = {
  condition: 0,
  or: 1,
  and: 2,
  comparison: 3,
  sum: 4,
  product: 5,
  sign: 6,
  power: 7,
  atom: 9,
} as const;

interface Piece {
  readonly latex: string;
  readonly level: number;
}

const atom = (latex: string): Piece => ({ latex, level: levels.atom });
const bracket = (piece: Piece, level: number): string =>
  piece.level < level ? `\\left(${piece.latex}\\right)` : piece.latex;

const comparisons: Record<string, string> = {
  "==": "=",
  "!=": "\\ne",
  "<": "<",
  "<=": "\\le",
  ">": ">",
  ">=": "\\ge",
};

const named: Record<string, string> = {
  ln: "\\ln",
  log10: "\\log_{10}",
  sin: "\\sin",
  cos: "\\cos",
  tan: "\\tan",
  asin: "\\arcsin",
  acos: "\\arccos",
  atan: "\\arctan",
  sinh: "\\sinh",
  cosh: "\\cosh",
  tanh: "\\tanh",
  asinh: "\\operatorname{arsinh}",
  acosh: "\\operatorname{arcosh}",
  atanh: "\\operatorname{artanh}",
  min: "\\min",
  max: "\\max",
};

const besselLetters: Record<string, string> = {
  bessel_j: "J",
  bessel_y: "Y",
  bessel_i: "I",
  bessel_k: "K",
  bessel_ie: "\\tilde I",
  bessel_ke: "\\tilde K",
};

/** LaTeX of an expression. */
export function expressionLatex(expression: Expression): string {
  return piece(expression).latex;
}

function piece(expression: Expression): Piece {
  switch (expression.node) {
    case "number":
      return atom(numberLatex(expression.value));
    case "text":
      return atom(quantityLatex(expression.text));
    case "name":
      return atom(symbolLatex(expression.name));
    case "member":
      return memberPiece(expression);
    case "unary":
      return expression.operator === "not"
        ? { latex: `\\text{not }${bracket(piece(expression.operand), levels.sign)}`, level: levels.and }
        : {
            latex: `${expression.operator}${bracket(piece(expression.operand), levels.product)}`,
            level: levels.sum,
          };
    case "binary":
      return binaryPiece(expression);
    case "conditional":
      return conditionalPiece(expression);
    case "call":
      return callPiece(expression);
  }
}

function numberLatex(value: number): string {
  const [mantissa = "", exponent] = String(value).split("e");
  if (exponent === undefined) return mantissa;
  const power = `10^{${exponent.replace("+", "")}}`;
  return mantissa === "1" ? power : `${mantissa}\\cdot ${power}`;
}

function quantityLatex(text: string): string {
  const match = /^\s*([-+]?[\d.,]+(?:e[-+]?\d+)?)\s*(.*)$/i.exec(text);
  if (!match) return `\\text{${escapeLatex(text)}}`;
  const unit = (match[2] ?? "").trim();
  return unit === "" ? (match[1] ?? "") : `${match[1]}\\,\\text{${escapeLatex(unit)}}`;
}

function memberPiece(expression: Extract<Expression, { node: "member" }>): Piece {
  // A column reads as its own symbol; a field of a choice or a material carries its owner as subscript.
  const owner = expression.object;
  if (owner.node === "name" && owner.name === "layers") return atom(symbolLatex(expression.member));
  const ownerName = owner.node === "name" ? owner.name : owner.node === "member" ? owner.member : "";
  return atom(withSubscript(expression.member, ownerName));
}

function withSubscript(symbol: string, owner: string): string {
  return owner === ""
    ? symbolLatex(symbol)
    : symbolLatex(symbol.includes("_") ? symbol : `${symbol}_${owner.replace(/_/g, " ")}`);
}

function binaryPiece(expression: Extract<Expression, { node: "binary" }>): Piece {
  const { operator } = expression;
  const left = piece(expression.left);
  const right = piece(expression.right);
  switch (operator) {
    case "+":
      return { latex: `${bracket(left, levels.sum)}+${bracket(right, levels.sum)}`, level: levels.sum };
    case "-":
      return { latex: `${bracket(left, levels.sum)}-${bracket(right, levels.product)}`, level: levels.sum };
    case "*": {
      // Two numbers side by side would read as one.
      const glue = /\d$/.test(left.latex) && /^[\d\\]?\d/.test(right.latex) ? "\\cdot " : "\\,";
      return {
        latex: `${bracket(left, levels.product)}${glue}${bracket(right, levels.product)}`,
        level: levels.product,
      };
    }
    case "/":
      return { latex: `\\frac{${left.latex}}{${right.latex}}`, level: levels.power };
    case "^":
      return {
        latex: `${bracket(left, expression.left.node === "binary" ? levels.atom : levels.atom)}^{${right.latex}}`,
        level: levels.power,
      };
    case "and":
    case "or":
      return {
        latex: `${bracket(left, levels[operator])}\\text{ ${operator} }${bracket(right, levels[operator])}`,
        level: levels[operator],
      };
    default:
      return {
        latex: `${bracket(left, levels.sum)} ${comparisons[operator]} ${optionOr(expression.right, right)}`,
        level: levels.comparison,
      };
  }
}

/** The right side of `case == "convection"` is an option's key, not a quantity. */
function optionOr(expression: Expression, found: Piece): string {
  if (expression.node === "text" && /^[A-Za-z][A-Za-z0-9_]*$/.test(expression.text))
    return `\\text{${escapeLatex(expression.text.replace(/_/g, " "))}}`;
  return bracket(found, levels.sum);
}

function conditionalPiece(expression: Extract<Expression, { node: "conditional" }>): Piece {
  const rows: string[] = [];
  let rest: Expression = expression;
  while (rest.node === "conditional") {
    rows.push(`${expressionLatex(rest.whenTrue)} & ${expressionLatex(rest.condition)}`);
    rest = rest.whenFalse;
  }
  rows.push(`${expressionLatex(rest)} & \\text{otherwise}`);
  return atom(`\\begin{cases}${rows.join("\\\\")}\\end{cases}`);
}

function callPiece(expression: Extract<Expression, { node: "call" }>): Piece {
  const args = expression.arguments.map((argument) => expressionLatex(argument));
  const list = args.join(",\\,");
  const { callee } = expression;
  if (callee.node === "member") return propertyPiece(callee, args);
  const name = callee.node === "name" ? callee.name : "";
  return specialForm(name, args) ?? functionPiece(name, expression, args, list);
}

function propertyPiece(callee: Extract<Expression, { node: "member" }>, args: readonly string[]): Piece {
  const owner =
    callee.object.node === "name"
      ? callee.object.name
      : callee.object.node === "member" && callee.object.member !== "material"
        ? callee.object.member
        : "";
  const match = /^(.*)_(mean|integral)$/.exec(callee.member);
  if (!match) return atom(`${withSubscript(callee.member, owner)}\\left(${args.join(",\\,")}\\right)`);
  const property = withSubscript(match[1] ?? "", owner);
  return match[2] === "integral"
    ? {
        latex: `\\int_{${args[0] ?? ""}}^{${args[1] ?? ""}} ${property}\\,\\mathrm{d}T`,
        level: levels.product,
      }
    : atom(`\\overline{${property}}\\left(${args.join("\\ldots ")}\\right)`);
}

function specialForm(name: string, args: readonly string[]): Piece | null {
  const [variable = "", low = "", high = "", body = ""] = args;
  switch (name) {
    case "balance":
      return {
        latex: `${variable}\\in\\left[${low},\\,${high}\\right]:\\ ${body}=0`,
        level: levels.condition,
      };
    case "argmin":
      return {
        latex: `\\operatorname*{arg\\,min}_{${low}\\le ${variable}\\le ${high}}\\left(${body}\\right)`,
        level: levels.product,
      };
    case "integral":
      return { latex: `\\int_{${low}}^{${high}} ${body}\\,\\mathrm{d}${variable}`, level: levels.product };
    case "series":
      return { latex: `\\sum_{${variable}=${low}}^{${high}} ${body}`, level: levels.product };
    case "fixed_point":
      return { latex: `${variable}=${high}\\quad\\text{from }${low}`, level: levels.condition };
    default:
      return null;
  }
}

function functionPiece(
  name: string,
  expression: Extract<Expression, { node: "call" }>,
  args: readonly string[],
  list: string,
): Piece {
  const only = args[0] ?? "";
  const bessel = besselLetters[name];
  if (bessel) return atom(`${bessel}_{${only}}\\left(${args.slice(1).join(",\\,")}\\right)`);
  switch (name) {
    case "sqrt":
      return atom(`\\sqrt{${only}}`);
    case "cbrt":
      return atom(`\\sqrt[3]{${only}}`);
    case "abs":
      return atom(`\\left|${only}\\right|`);
    case "exp":
      return { latex: `\\mathrm{e}^{${only}}`, level: levels.power };
    case "sum":
      return args.length === 1
        ? {
            latex: `\\sum ${bracket(piece(expression.arguments[0] as Expression), levels.product)}`,
            level: levels.product,
          }
        : atom(`\\sum\\left(${list}\\right)`);
    case "number_in":
      return atom(`\\left\\{${only}\\right\\}_{${args[1] ?? ""}}`);
    case "as_temperature":
      return piece(expression.arguments[0] as Expression);
    case "bessel_j_zero":
      return atom(`j_{${list}}`);
    default:
      return atom(`${functionName(name)}\\left(${list}\\right)`);
  }
}

const builtIn = new Set(languageFunctions.map((row) => row.name));

/** Functions of the language are set upright; those of the working look like the symbol on their left-hand side. */
function functionName(name: string): string {
  return named[name] ?? (builtIn.has(name) ? `\\operatorname{${escapeLatex(name)}}` : symbolLatex(name));
}
