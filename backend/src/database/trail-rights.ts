import type { DataSource } from 'typeorm';

/** Whether this connection's user could change or remove a line of the trail. */
export async function couldChangeTrail(dataSource: DataSource): Promise<boolean> {
  const rows: { could: boolean }[] = await dataSource.query(
    `SELECT has_table_privilege('trail', 'UPDATE') OR has_table_privilege('trail', 'DELETE')
         OR has_table_privilege('trail', 'TRUNCATE') AS could`,
  );
  return rows[0]?.could !== false;
}
