/**
 * Speed of the engine: compiled workings against the same formulas by hand and against interpreters that a developer
 * would otherwise pick. Ratios of times measured in turns in one run, medians. `npm run bench -- engine`
 */
import { checkProgram, type ProgramSource } from "@/lib/language";
import { compileProgram } from "@/lib/language/compile";
import { sourceOf } from "@/tests/engine/language-inputs";
import type { Contestant } from "./engine-contestants";
import { finSource, templates } from "./engine-templates";

const rounds = 31;
const roundMilliseconds = 12;

/** Median nanoseconds of one run of each, measured in turns. */
function measure(contestants: readonly Contestant[]): Map<string, number[]> {
  const times = new Map<string, number[]>(contestants.map(({ name }) => [name, []]));
  let sink = 0;
  const batch = new Map<string, number>();
  for (const { name, run } of contestants) {
    let count = 1;
    for (let warm = 0; warm < 12; warm++) {
      const started = performance.now();
      for (let i = 0; i < count; i++) sink += run(i);
      const spent = performance.now() - started;
      if (spent < roundMilliseconds)
        count = Math.ceil(count * Math.min(10, (1.1 * roundMilliseconds) / Math.max(spent, 0.01)));
    }
    batch.set(name, count);
  }
  for (let round = 0; round < rounds; round++) {
    for (const { name, run } of contestants) {
      const count = batch.get(name)!;
      const started = performance.now();
      for (let i = 0; i < count; i++) sink += run(i);
      times.get(name)!.push(((performance.now() - started) * 1e6) / count);
    }
  }
  if (Number.isNaN(sink)) console.log("A contestant answers something that is not a number.");
  return times;
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

for (const { name, contestants, aims } of templates) {
  const results = contestants.map((each) => each.run(3));
  const times = measure(contestants);
  const own = times.get("compiled")!;
  console.log(`\n${name}: compiled ${median(own).toFixed(0)} ns a run`);
  contestants.forEach((each, index) => {
    if (each.name === "compiled") return;
    const ratios = times
      .get(each.name)!
      .map((time, round) => (each.name === "by hand" ? own[round]! / time : time / own[round]!));
    const deviation =
      each.name === "mathjs Units"
        ? ""
        : `, values within ${Math.abs(results[index]! / results[0]! - 1).toExponential(0)}`;
    const word = each.name === "by hand" ? "× the time" : "× faster";
    console.log(
      `  ${each.name.padEnd(15)} ${median(ratios).toFixed(2).padStart(8)} ${word} (aim ${aims[each.name] ?? "report"})${deviation}`,
    );
  });
}

/** A working of forty lines: four of the hard ones under other names, checked together. */
function fortyLines(): ProgramSource {
  const inputs = finSource.inputs;
  const lines = ["P = 2*(w + t)", "A_c = w*t", "m = sqrt(h*P/(k*A_c))"];
  for (let i = 0; lines.length < 40; i++) {
    lines.push(
      `loss_${i}(s) = h*(1 + s/L)*P*(T_b - T_inf)*exp(-m*s)/(1 + ${i + 1}*k/(h*L))`,
      `x_${i} = balance(s, 0, 20*L, loss_${i}(s) - loss_${i}("${5 + i} mm")*${0.5 + i / 40})`,
      `Q_${i} = loss_${i}(x_${i})*x_${i} + sqrt(h*P*k*A_c)*tanh(m*x_${i})*(T_b - T_inf)`,
      `eta_${i} = Q_${i}/(h*P*L*(T_b - T_inf)) + (tip == "convecting" ? max(x_${i}/L, 0.5) : clamp(L/w, 0.1, 2))`,
    );
  }
  return sourceOf({ inputs, working: lines.slice(0, 40).join("\n") });
}

const forty = fortyLines();
const checkTimes: number[] = [];
const bothTimes: number[] = [];
for (let round = 0; round < 400; round++) {
  const started = performance.now();
  const { program, diagnostics } = checkProgram(forty);
  const checked = performance.now();
  if (!program) throw new Error(diagnostics.map((each) => each.message).join("\n"));
  compileProgram(program);
  checkTimes.push(checked - started);
  bothTimes.push(performance.now() - started);
}
console.log(
  `\ncheck + compile of a working of 40 lines: ${median(bothTimes.slice(150)).toFixed(2)} ms warm, of which the check ${median(checkTimes.slice(150)).toFixed(2)} ms (aim ≤ 5 ms); first ${bothTimes[0]!.toFixed(1)} ms`,
);
