/** Ends this process when it is told to, or when the start command that began it is gone. */
export function endWithLauncher(stop: () => Promise<void>): void {
  let isStopping = false;
  const end = (): void => {
    if (isStopping) return;
    isStopping = true;
    stop().then(
      () => process.exit(0),
      (error: unknown) => {
        process.stderr.write(`${String(error)}\n`);
        process.exit(1);
      },
    );
  };
  process.once('SIGTERM', end);
  process.once('SIGINT', end);
  process.once('disconnect', end);
  process.send?.({ ready: true });
}
