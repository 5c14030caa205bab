/**
 * Long run of the random programs against the oracle interpreter (the tests run the first 500):
 *   npm run bench -- random-programs [programs] [first seed]
 * Ends with code 1 when one disagrees.
 */
import { disagreements } from "@/tests/engine/oracle/compare";

const programs = Number(process.argv[2] ?? 10_000);
const first = Number(process.argv[3] ?? 1_001);

let failed = 0;
const started = performance.now();
for (let seed = first; seed < first + programs; seed++) {
  for (const text of disagreements(seed)) {
    failed++;
    console.log(`seed ${seed}: ${text}\n`);
  }
  const done = seed - first + 1;
  if (done % 500 === 0) {
    const seconds = ((performance.now() - started) / 1000).toFixed(0);
    console.log(`${done} of ${programs} programs, ${failed} disagree, ${seconds} s`);
  }
}
console.log(`${programs} random programs of two runs each: ${failed} disagree with the oracle.`);
process.exitCode = failed === 0 ? 0 : 1;
