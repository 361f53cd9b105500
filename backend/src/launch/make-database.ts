import pg from 'pg';

/** The user that migrates and owns the tables, and the one that the application runs as. */
export const ownerUser = 'ebbfolk_owner';
export const appUser = 'ebbfolk_app';

/** Runs statements as one user of a server, on a connection of their own. */
export async function withClient<Result>(
  url: string,
  work: (client: pg.Client) => Promise<Result>,
): Promise<Result> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

/** Makes the two users where they are missing, and sets their passwords. */
export async function makeUsers(
  client: pg.Client,
  passwords: { readonly owner: string; readonly app: string },
): Promise<void> {
  for (const [user, password] of [
    [ownerUser, passwords.owner],
    [appUser, passwords.app],
  ] as const) {
    const found = await client.query('SELECT FROM pg_roles WHERE rolname = $1', [user]);
    const verb = found.rowCount === 0 ? 'CREATE' : 'ALTER';
    await client.query(
      `${verb} ROLE ${pg.escapeIdentifier(user)} LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE
         PASSWORD ${pg.escapeLiteral(password)}`,
    );
  }
}

/**
 * Makes the database where it is missing; nobody but the two users may connect to it. Answers
 * whether it was missing.
 */
export async function makeDatabase(client: pg.Client, database: string): Promise<boolean> {
  const name = pg.escapeIdentifier(database);
  const found = await client.query('SELECT FROM pg_database WHERE datname = $1', [database]);
  if (found.rowCount === 0) {
    await client.query(`CREATE DATABASE ${name} OWNER ${pg.escapeIdentifier(ownerUser)}`);
  }
  await client.query(`REVOKE ALL ON DATABASE ${name} FROM PUBLIC`);
  await client.query(`GRANT CONNECT ON DATABASE ${name} TO ${pg.escapeIdentifier(appUser)}`);
  return found.rowCount === 0;
}
