/**
 * Feeds 100,000 broken Touchstone files to the reader: `npm run fuzz [-- COUNT [SEED]]`. Ends with 1 at the first file that
 * makes it throw anything but a refusal, take numbers silently in part, or work for more than a second.
 */
import { brokenFile, probe, randomSource } from '../../libs/touchstone/src/testing/broken-files';

const count = Number(process.argv[2] ?? 100_000);
const seed = Number(process.argv[3] ?? 1);
const random = randomSource(seed);
const seen: Record<string, number> = { read: 0, refused: 0 };
let slowestMs = 0;

for (let k = 0; k < count; k++) {
  const { name, text } = brokenFile(random);
  const start = performance.now();
  const outcome = probe(name, text);
  const ms = performance.now() - start;
  slowestMs = Math.max(slowestMs, ms);
  if ((outcome !== 'read' && outcome !== 'refused') || ms > 1000) {
    process.stderr.write(
      `File ${k} of seed ${seed} (${name}, ${ms.toFixed(1)} ms): ${outcome}\n${JSON.stringify(text)}\n`,
    );
    process.exit(1);
  }
  seen[outcome] = (seen[outcome] ?? 0) + 1;
}
process.stdout.write(
  `${count} files, seed ${seed}: ${seen['read']} read whole, ${seen['refused']} refused; slowest ${slowestMs.toFixed(1)} ms\n`,
);
