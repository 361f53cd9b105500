import { CannotStart } from './say.ts';

/** Something that runs until it is stopped. */
export interface Runs {
  readonly name: string;
  stop(): Promise<void>;
  /** Resolves, with what it wrote last, when it ends without having been told to. */
  readonly gone: Promise<string>;
}

/**
 * All that one start has begun. Stopping goes backwards, so that the application ends before
 * what it needs; whatever is added after that is stopped at once.
 */
export class Launch {
  readonly stopping = new AbortController();
  private readonly begun: Runs[] = [];
  private tellTrouble: (what: string) => void = () => undefined;
  /** Resolves with a sentence when a part ends that nobody told to. */
  readonly trouble = new Promise<string>((resolve) => {
    this.tellTrouble = resolve;
  });

  async add(runs: Runs): Promise<void> {
    if (this.stopping.signal.aborted) {
      await runs.stop();
      throw new CannotStart(`Stopped while ${runs.name} was starting.`);
    }
    this.begun.push(runs);
    void runs.gone.then((lines) =>
      this.tellTrouble(
        `${runs.name} has ended unexpectedly, so everything stops.\n${lines}`.trimEnd(),
      ),
    );
  }

  async stop(): Promise<void> {
    this.stopping.abort();
    for (let runs = this.begun.pop(); runs !== undefined; runs = this.begun.pop())
      await runs.stop();
  }
}
