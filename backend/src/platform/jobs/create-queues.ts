import PgBoss from 'pg-boss';

/** Creates the queue schema and its queues. Needs the owner, since a queue is a table of its own. */
export async function createQueues(ownerUrl: string, queueNames: readonly string[]): Promise<void> {
  const boss = new PgBoss({
    connectionString: ownerUrl,
    max: 2,
    supervise: false,
    schedule: false,
  });
  const failures: unknown[] = [];
  boss.on('error', (error) => failures.push(error));
  await boss.start();
  try {
    for (const name of queueNames) await boss.createQueue(name);
  } finally {
    await boss.stop({ graceful: true, wait: true });
  }
  if (failures.length > 0) throw new AggregateError(failures, 'The job queues could not be made');
}
