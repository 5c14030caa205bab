import { type Unit, fromSi } from "@/lib/units";
import { amountText, resultText } from "./amount-text";
import type { CompiledMaterial } from "./compiled-material";
import type { Caution, LimitVerdict } from "./evaluation";
import { type MaterialReader, rangeText, temperatureText } from "./material-reader";
import type { Prepared } from "./prepare";
import { propertyQuantities } from "./property-quantity";
import type { RunWords } from "./run-state";

/** Verdicts of a definition's limits in its own order, after a run. Throws `RunFault`. */
export function judgeLimits(prepared: Prepared, words: RunWords): LimitVerdict[] {
  const { compiled, frame } = prepared;
  return prepared.limits.map(({ declaration, condition, label, message, compared }) => {
    const broken = compiled.holds(frame, condition);
    const verdict: LimitVerdict = {
      code: declaration.code,
      level: declaration.level,
      label: words.message(label),
      broken,
    };
    if (broken) verdict.message = words.message(message);
    const sides = compared && compiled.compared(frame, condition);
    if (!compared || !sides) return verdict;
    const { unit, kind } =
      compared.symbol === null ? compared.display : words.display(compared.symbol, compared.display);
    const value = fromSi(sides.value, unit, kind);
    const bound = fromSi(sides.bound, unit, kind);
    if (Number.isFinite(value) && Number.isFinite(bound))
      Object.assign(verdict, { value, bound, unit: unit.symbol });
    return verdict;
  });
}

/** Whether any limit of the definition is broken, worst first, without words for those that hold. */
export function brokenLimits(prepared: Prepared, words: RunWords): { stop: boolean; cautions: Caution[] } {
  const cautions: Caution[] = [];
  let stop = false;
  for (const { declaration, condition, message } of prepared.limits) {
    if (!prepared.compiled.holds(prepared.frame, condition)) continue;
    if (declaration.level === "stop") stop = true;
    cautions.push({ code: declaration.code, message: words.message(message) });
  }
  return { stop, cautions };
}

interface ServiceUse {
  readonly material: CompiledMaterial;
  lowest: number;
  highest: number;
  pointer: string;
  broken: { readonly temperature: number; readonly limit: number } | null;
}

function serviceUses(readers: readonly MaterialReader[]): ServiceUse[] {
  const uses: ServiceUse[] = [];
  for (const reader of readers) {
    const { material } = reader;
    if (!material?.service) continue;
    const known = uses.find((use) => use.material === material);
    const broken = reader.serviceBroken();
    if (!known) {
      uses.push({
        material,
        lowest: reader.lowest,
        highest: reader.highest,
        pointer: reader.pointer,
        broken,
      });
      continue;
    }
    known.lowest = Math.min(known.lowest, reader.lowest);
    known.highest = Math.max(known.highest, reader.highest);
    known.broken ??= broken;
  }
  return uses;
}

function inUnit(kelvin: number, unit: Unit): string {
  return resultText(fromSi(kelvin, unit, "absolute"), unit.symbol, 4);
}

/** A declared limit of use as it was typed; a conversion there and back leaves no last bits. */
function declaredText(kelvin: number, unit: Unit): string {
  return amountText(Number(fromSi(kelvin, unit, "absolute").toPrecision(10)), unit.symbol);
}

function serviceLabel({ name, service }: CompiledMaterial): string {
  if (!service) return name;
  const { min, max, unit } = service;
  if (min === -Infinity) return `${name} used at most at ${declaredText(max, unit)}`;
  if (max === Infinity) return `${name} used at least at ${declaredText(min, unit)}`;
  return `${name} used between ${declaredText(min, unit)} and ${declaredText(max, unit)}`;
}

function serviceVerdict({ material, lowest, highest, broken }: ServiceUse, code: string): LimitVerdict {
  const { service, name } = material;
  const verdict: LimitVerdict = {
    code,
    level: "stop",
    label: serviceLabel(material),
    broken: broken !== null,
  };
  if (!service) return verdict;
  const { unit } = service;
  if (broken) {
    const note = service.note.trim() === "" ? "" : ` ${service.note.trim()}`;
    verdict.message = `${name} is used at ${inUnit(broken.temperature, unit)}; its limit of use is ${declaredText(broken.limit, unit)}.${note}`;
  }
  const value = broken?.temperature ?? (service.max < Infinity ? highest : lowest);
  const bound = broken?.limit ?? (service.max < Infinity ? service.max : service.min);
  if (!Number.isFinite(value)) return verdict;
  return {
    ...verdict,
    value: fromSi(value, unit, "absolute"),
    bound: fromSi(bound, unit, "absolute"),
    unit: unit.symbol,
  };
}

/** Automatic limits of use, one for each material that has any; two revisions of one material are told apart. */
export function judgeService(readers: readonly MaterialReader[]): LimitVerdict[] {
  const uses = serviceUses(readers);
  return uses.map((use) => {
    const { slug, revision } = use.material;
    const twice = uses.some((other) => other !== use && other.material.slug === slug);
    return serviceVerdict(use, `service-${slug}${twice ? `-r${revision}` : ""}`);
  });
}

/** What was read outside its valid range because the run allowed it. */
export function extrapolationCautions(readers: readonly MaterialReader[]): Caution[] {
  const cautions: Caution[] = [];
  for (const reader of readers) {
    for (const { property, lowest, highest } of reader.extrapolations) {
      const at =
        lowest === highest
          ? `to ${temperatureText(lowest, property.argumentUnit)}`
          : `to ${temperatureText(lowest, property.argumentUnit)} and ${temperatureText(highest, property.argumentUnit)}`;
      cautions.push({
        code: "extrapolation",
        message: `The ${propertyQuantities[property.name]} of ${reader.material?.name ?? "the material"} was extrapolated ${at}; it is valid ${rangeText(property)}.`,
        pointer: reader.pointer,
      });
    }
  }
  return cautions;
}
