/**
 * The wall between a definition and `new Function`: every word of generated code must be a register made by the
 * compiler, a word of the grammar subset it uses, a member it reads, or a function of the runtime.
 */

const words = [
  ...["use", "strict", "const", "let", "if", "else", "for", "function", "return", "new", "true", "false"],
  ...["Math", "Float64Array", "NaN"],
  // Frame, runtime, "judging", fuel, line being evaluated, "a call was not finite while a solver iterated".
  ...["F", "X", "J", "U", "A", "Z", "N", "D", "V"],
];

const members = [
  ...["length", "numbers", "columns", "choices", "choiceColumns", "materials", "columnMaterials", "values"],
  ...["value", "mean", "integral"],
];

/** Names under which generated code hands back its functions. */
const results = ["run", "begin", "fuel", "at", "holds", "compared"];

const register = /^[a-zA-Z][0-9]+$/;
/** Text, number, word, sign, or what is none of them. */
const token =
  /"([^"\\\n]*)"|(\d+\.?\d*(?:e[+-]?\d+)?)|([A-Za-z_$][\w$]*)|([-+*/%=<>!&|?:;,.(){}[\]])|\s+|([^])/g;

/** What generated code may name beside its own words. */
export interface Permitted {
  /** Functions of the runtime, which it calls by name. */
  readonly functions: readonly string[];
  /** Methods of the runtime object `X`, and functions of `Math`. */
  readonly methods: readonly string[];
  /** String literals. */
  readonly texts: readonly string[];
}

/** Throws an `Error` when generated code holds anything that the compiler does not emit by design. */
export function assertGenerated(code: string, permitted: Permitted): void {
  const allowedWords = new Set([...words, ...results, ...permitted.functions]);
  const allowedMembers = new Set([...members, ...permitted.methods]);
  const allowedTexts = new Set(["use strict", ...permitted.texts]);
  let afterDot = false;
  for (const match of code.matchAll(token)) {
    const [whole, text, number, word, sign, other] = match;
    const refused =
      other !== undefined ||
      (text !== undefined && !allowedTexts.has(text)) ||
      (word !== undefined &&
        !(afterDot ? allowedMembers.has(word) : register.test(word) || allowedWords.has(word)));
    if (refused) {
      throw new Error(`Generated code holds ${whole} at ${match.index}, which is not on the list.`);
    }
    if (sign === ".") afterDot = true;
    else if ((number ?? word ?? text ?? sign) !== undefined) afterDot = false;
  }
}
