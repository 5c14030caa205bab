import { checkProgram, type CheckResult, type Diagnostic } from "@/lib/language";
import { checkInputs } from "./check-inputs";
import { checkUses } from "./check-uses";
import { Definition } from "./definition";
import { programSource } from "./program-source";
import { schemaDiagnostics } from "./schema-diagnostics";
import { sizeDiagnostic } from "./size-limit";

export interface DefinitionCheck {
  /** null when the shape is wrong. */
  readonly definition: Definition | null;
  /** null when the shape is wrong. Its program is null while an error stands. */
  readonly check: CheckResult | null;
  /** Everything that was found, in the order of the definition's parts. */
  readonly diagnostics: Diagnostic[];
}

const memberNames = [
  ...Object.keys(Definition.shape),
  ..."kind symbol label quantity unit default min max above below usualMin usualMax uncertainty note options key values needs orConstant fixed columns minRows maxRows maxLength appliesWhen mustType digits list code when level message that value relTol absTol refused source basis edition text".split(
    " ",
  ),
];

/** Dependent checks may find one fault twice (a unit that no quantity has): it is told once. */
function once(found: readonly Diagnostic[]): Diagnostic[] {
  const told = new Set<string>();
  return found.filter(({ path, line, column, code }) => {
    const key = `${path} ${line ?? 0} ${column ?? 0} ${code}`;
    if (told.has(key)) return false;
    told.add(key);
    return true;
  });
}

/**
 * Checks a definition as it came in: size, shape, units, quantities, bounds, defaults, the working with every
 * condition, figures and worked cases. Never throws; everything found is in `diagnostics`.
 */
export function checkDefinition(raw: unknown): DefinitionCheck {
  const size = sizeDiagnostic(raw);
  if (size) return { definition: null, check: null, diagnostics: [size] };
  const parsed = Definition.safeParse(raw);
  if (!parsed.success) {
    return {
      definition: null,
      check: null,
      diagnostics: once(schemaDiagnostics(parsed.error, raw, memberNames)),
    };
  }
  const definition = parsed.data;
  const check = checkProgram(programSource(definition));
  return {
    definition,
    check,
    diagnostics: once([...checkInputs(definition), ...check.diagnostics, ...checkUses(definition, check)]),
  };
}
