/** Where signing in begins; afterwards the browser comes to `returnTo`, a path of this site. */
export function signInAddress(returnTo: string | null): string {
  const isOurs = returnTo !== null && /^\/(?!\/)/.test(returnTo);
  return `/auth/sign-in?${new URLSearchParams({ returnTo: isOurs ? returnTo : '/' }).toString()}`;
}
