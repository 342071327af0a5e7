/** What a failed run tells its caller, by exit code of the command line. */
export const EXIT = {
  done: 0,
  faultsFound: 1,
  wrongRequest: 2,
  unreadableModel: 3,
  ourFault: 70,
} as const;

/** An error that is the user's to mend: said in one line, never with a stack trace. */
export class PinwrightError extends Error {
  override readonly name: string = 'PinwrightError';
  readonly exitCode: number;
  constructor(message: string, exitCode: number) {
    super(message);
    this.exitCode = exitCode;
  }
}

/** The command, the brief or an output path is wrong. */
export class RequestError extends PinwrightError {
  override readonly name = 'RequestError';
  constructor(message: string) {
    super(message, EXIT.wrongRequest);
  }
}

/** The model cannot be read: missing, not IFC, of an unknown schema, damaged. */
export class ModelError extends PinwrightError {
  override readonly name = 'ModelError';
  constructor(message: string) {
    super(message, EXIT.unreadableModel);
  }
}
