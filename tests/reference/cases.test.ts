import { describe, expect, it } from "vitest";
import { coldRuns } from "./cases/cold";
import { finRuns } from "./cases/fins";
import { generationRuns } from "./cases/generation";
import { jointRuns } from "./cases/joints";
import { materialRuns } from "./cases/materials";
import { pipeRuns } from "./cases/pipes";
import { shapeRuns } from "./cases/shapes";
import { textRuns } from "./cases/texts";
import { transientRuns } from "./cases/transient";
import { uncertaintyRuns } from "./cases/uncertainty";
import { unitRuns } from "./cases/units";
import { wallRuns } from "./cases/walls";
import { deviation, referenceCases, type CaseRuns } from "./reference-case";
import { templateSlugs } from "./shelf";

const groups: readonly CaseRuns[] = [
  wallRuns,
  generationRuns,
  pipeRuns,
  jointRuns,
  finRuns,
  shapeRuns,
  transientRuns,
  materialRuns,
  coldRuns,
  unitRuns,
  uncertaintyRuns,
  textRuns,
];
const runs: CaseRuns = Object.assign({}, ...groups) as CaseRuns;

describe("reference cases", () => {
  it("has one way to run for each of the 164 cases", () => {
    const listed = groups.flatMap((group) => Object.keys(group));
    expect(listed).toHaveLength(164);
    expect(listed.sort()).toEqual(referenceCases.map(({ id }) => id).sort());
  });

  it("runs most of them through the templates of the shelf", () => {
    const shelf = Object.values(runs).filter(({ through }) =>
      templateSlugs.includes(through.split(",")[0] ?? ""),
    );
    expect(shelf.length).toBeGreaterThanOrEqual(127);
  });

  for (const reference of referenceCases) {
    const title = `${reference.id} ${reference.title} (${reference.source}; ${reference.basis})`;
    it(title, () => {
      const way = runs[reference.id];
      if (!way) throw new Error(`${reference.id} is not run.`);
      const answers = way.answers(reference);
      expect(Object.keys(answers).sort()).toEqual(Object.keys(reference.expected).sort());
      const missed: object[] = [];
      for (const [name, expected] of Object.entries(reference.expected)) {
        const answer = answers[name];
        if (typeof expected.value === "boolean" || typeof answer !== "number") {
          if (answer !== expected.value) missed.push({ name, answer });
          continue;
        }
        const found = deviation(expected, answer);
        if (!(found.distance <= found.allowed)) missed.push({ name, ...found });
      }
      expect(missed, `through ${way.through}`).toEqual([]);
    });
  }
});
