/** Tells the person at the terminal what is going on; data never goes this way. */
export function say(line: string): void {
  process.stderr.write(`${line}\n`);
}

/** Something that the person at the terminal can mend; the message says how, in a sentence. */
export class CannotStart extends Error {
  constructor(message: string) {
    super(message);
    this.name = 'CannotStart';
  }
}

/** Runs a command of the launch folder: a sentence and exit code 1 when it cannot go on. */
export async function runCommand(work: () => unknown): Promise<void> {
  try {
    await work();
  } catch (error) {
    const isPlain =
      error instanceof CannotStart || (error instanceof Error && error.name === 'WrongSettings');
    say(
      isPlain
        ? error.message
        : error instanceof Error
          ? (error.stack ?? error.message)
          : String(error),
    );
    process.exitCode = 1;
  }
}
