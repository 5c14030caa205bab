export * from "./types";
export { languageConstants, languageFunctions, reservedWords, specialForms } from "./functions";
export type { TypeRule } from "./functions";
export { limits } from "./limits";
export { parseExpression, parseWorking } from "./parse";
export { checkProgram } from "./check/program";
