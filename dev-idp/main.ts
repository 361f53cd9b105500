import type { JWK } from 'oidc-provider';
import { startDevIdp } from './provider.ts';

const idp = await startDevIdp({
  port: Number(wanted('DEV_IDP_PORT')),
  clientId: wanted('DEV_IDP_CLIENT_ID'),
  clientSecret: wanted('DEV_IDP_CLIENT_SECRET'),
  redirectUris: wanted('DEV_IDP_REDIRECT_URIS').split(' '),
  postLogoutUris: wanted('DEV_IDP_POST_LOGOUT_URIS').split(' '),
  signingKey: JSON.parse(wanted('DEV_IDP_SIGNING_KEY')) as JWK,
  cookieKey: wanted('DEV_IDP_COOKIE_KEY'),
});
process.once('SIGTERM', stop);
process.once('SIGINT', stop);
process.once('disconnect', stop);
process.send?.({ ready: true });

function stop(): void {
  idp.close().then(
    () => process.exit(0),
    (error: unknown) => {
      process.stderr.write(`${String(error)}\n`);
      process.exit(1);
    },
  );
}

function wanted(name: string): string {
  const value = process.env[name];
  if (value === undefined || value === '') throw new Error(`${name} is missing.`);
  return value;
}
