import { CommanderError } from 'commander';
import { EXIT, ModelError, PinwrightError } from '../domain/errors.ts';

/** Says an error in one line on stderr and gives the exit code it stands for. */
export function reportFailure(error: unknown): number {
  if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.done : EXIT.wrongRequest;
  if (process.env.PINWRIGHT_DEBUG === '1') console.error(error);
  if (error instanceof PinwrightError) {
    process.stderr.write(`${printable(error.message)}\n`);
    return error.exitCode;
  }
  const what = error instanceof Error ? error.message : String(error);
  process.stderr.write(
    `pinwright: a fault of our own: ${printable(what)}; set PINWRIGHT_DEBUG=1 for where, and please report it\n`,
  );
  return EXIT.ourFault;
}

/** What `work` gives; a fault of the model is told with its path, since the stages know bytes and the user knows files. */
export async function namingModel<T>(path: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    throw error instanceof ModelError ? new ModelError(`${path}: ${error.message}`) : error;
  }
}

/** Text from files may hold terminal codes; lines stay, since a brief lists several problems. */
function printable(text: string): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: taking control characters out is the purpose
  return text.replace(/[\u0000-\u0009\u000b-\u001f\u007f-\u009f]/g, '\ufffd');
}
