/** Whether a process of this id exists, of whichever user. */
export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    const code: unknown = error instanceof Error ? Reflect.get(error, 'code') : null;
    if (code === 'EPERM') return true;
    if (code === 'ESRCH') return false;
    throw error;
  }
}
