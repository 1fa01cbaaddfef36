import { checkFile, exitCodes } from './check-file';
import { readCommand } from './command';
import { Refused, spoken } from './refused';

/** Relative paths begin where the person stands, which npm keeps in INIT_CWD. */
const folder = process.env['INIT_CWD'] ?? process.cwd();

try {
  const { out, errors, exitCode } = checkFile(readCommand(process.argv.slice(2)), folder);
  process.stdout.write(out);
  process.stderr.write(errors);
  process.exitCode = exitCode;
} catch (error) {
  // Node would end with 1, which here means that the channel exceeds a limit.
  process.exitCode = exitCodes.wrong;
  if (error instanceof Refused) {
    process.stderr.write(error.refusals.map((refusal) => `${spoken(refusal)}\n`).join(''));
  } else {
    const told = error instanceof Error ? (error.stack ?? error.message) : String(error);
    process.stderr.write(`The check failed by a fault of the program: ${told}\n`);
  }
}
