/** The command line: derive, evaluate and check a formulation without database or server. */
import { readFileSync } from 'node:fs';
import {
  readArguments,
  USAGE,
  UsageFault,
} from '../shared/thermodynamics/commandLine/arguments.ts';
import { run } from '../shared/thermodynamics/commandLine/run.ts';

const STANDARD_INPUT = 0;

function readSource(file: string): string {
  try {
    return readFileSync(file === '-' ? STANDARD_INPUT : file, 'utf8');
  } catch (fault) {
    const isMissing = (fault as NodeJS.ErrnoException).code === 'ENOENT';
    throw new UsageFault(isMissing ? `There is no file ${file}.` : `${file} cannot be read.`);
  }
}

try {
  const args = readArguments(process.argv.slice(2));
  if (!args) {
    process.stdout.write(USAGE);
  } else {
    const { output, status } = await run(args, readSource(args.file));
    process.stdout.write(output);
    process.exitCode = status;
  }
} catch (fault) {
  if (!(fault instanceof UsageFault)) throw fault;
  process.stderr.write(`${fault.message}\n\n${USAGE}`);
  process.exitCode = 2;
}
