import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { join } from 'node:path';
import { z } from 'zod';
import { readKept, writeKept } from './kept-file.ts';

const shape = z.strictObject({
  sessionSecret: z.string(),
  trailKey: z.string(),
  oidcClientSecret: z.string(),
  signInCookieKey: z.string(),
  /** The private key, a JSON Web Key, with which the stand-in provider signs. */
  signInSigningKey: z.record(z.string(), z.unknown()),
  superuserPassword: z.string(),
  ownerPassword: z.string(),
  appPassword: z.string(),
});

/** Everything secret that a start on one computer needs, made once. */
export type Secrets = z.output<typeof shape>;

/** New random secrets. */
export function makeSecrets(): Secrets {
  const { privateKey } = generateKeyPairSync('rsa', { modulusLength: 2048 });
  return {
    sessionSecret: randomHex(),
    trailKey: randomHex(),
    oidcClientSecret: randomHex(),
    signInCookieKey: randomHex(),
    signInSigningKey: {
      ...privateKey.export({ format: 'jwk' }),
      use: 'sig',
      alg: 'RS256',
      kid: randomBytes(8).toString('hex'),
    },
    superuserPassword: randomHex(),
    ownerPassword: randomHex(),
    appPassword: randomHex(),
  };
}

/** The secrets kept in the data folder, made at the first start. */
export function keptSecrets(folder: string): Secrets {
  const file = join(folder, 'secrets.json');
  const kept = readKept(file, shape);
  if (kept !== null) return kept;
  const made = makeSecrets();
  writeKept(file, made);
  return made;
}

function randomHex(): string {
  return randomBytes(32).toString('hex');
}
