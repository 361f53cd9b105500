import { demoPeople, demoRefusedPeople } from '#shared/demo/demo-people.ts';
import type { DemoPerson } from '#shared/demo/demo-people.ts';

/** A page of the stand-in, and the nonce that its one style and script carry. */
interface Page {
  readonly title: string;
  readonly body: string;
  readonly nonce: string;
}

/** What the browser may load for a page: its own style and script, fonts from here, nothing else. */
export function contentPolicy(nonce: string): string {
  return [
    "default-src 'none'",
    `style-src 'nonce-${nonce}'`,
    `script-src 'nonce-${nonce}'`,
    "font-src 'self'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
  ].join('; ');
}

/** One button for each person of the demo, then for those whom the sign-in refuses. */
export function choosePage(action: string, nonce: string): string {
  return page({
    title: 'Sign in',
    nonce,
    body: `
      <h1>Choose who to sign in as</h1>
      <p class="lead">This page stands in for the group’s own sign-in while Ebbfolk runs on one
        computer. The people are invented, and nobody needs a password.</p>
      <form method="post" action="${escapeHtml(action)}">
        <ul>${demoPeople.map(personButton).join('')}</ul>
        <h2>To see how a sign-in is refused</h2>
        <ul>${demoRefusedPeople.map(personButton).join('')}</ul>
        <button class="quiet" name="cancel" value="yes">Go back without signing in</button>
      </form>`,
  });
}

/** Sends the provider's own sign-out form by itself; a button where scripts are off. */
export function signOutPage(form: string, nonce: string): string {
  return page({
    title: 'Sign out',
    nonce,
    body: `
      <h1>Signing out</h1>
      ${form}
      <button class="plain" form="op.logoutForm" name="logout" value="yes">Sign out</button>
      <script nonce="${nonce}">
        document.querySelector('button[name=logout]').click();
      </script>`,
  });
}

/** Shown when the application asked for no page to go back to. */
export function signedOutPage(nonce: string): string {
  return page({
    title: 'Signed out',
    nonce,
    body: `<h1>You are signed out</h1><p class="lead">You can close this page.</p>`,
  });
}

/** What went wrong, in the words of the provider. */
export function errorPage(
  error: { readonly error: string; readonly error_description?: string | undefined },
  nonce: string,
): string {
  return page({
    title: 'This sign-in did not work',
    nonce,
    body: `
      <h1>This sign-in did not work</h1>
      <p class="lead">Go back to Ebbfolk and sign in from there once more.</p>
      <p>The stand-in says: <code>${escapeHtml(error.error)}</code>
        ${escapeHtml(error.error_description ?? '')}</p>`,
  });
}

function personButton(person: DemoPerson): string {
  return `
    <li><button name="subject" value="${escapeHtml(person.subject)}">
      <span class="who"><b>${escapeHtml(person.name)}</b>
        <i>${escapeHtml(placeInGroup(person))}</i></span>
      <span>${escapeHtml(person.description)}</span>
      <small>${escapeHtml(person.email)}</small>
    </button></li>`;
}

function placeInGroup({ roles, isEmailVerified }: DemoPerson): string {
  if (!isEmailVerified) return 'address not verified';
  if (roles.length === 0) return 'not in the group';
  return roles.filter((role) => role !== 'volunteer').join(', ') || 'volunteer';
}

function page({ title, body, nonce }: Page): string {
  return `<!doctype html>
<html lang="en-GB">
  <head>
    <meta charset="utf-8">
    <meta name="viewport" content="width=device-width, initial-scale=1">
    <meta name="color-scheme" content="light dark">
    <title>${escapeHtml(title)} · sign-in stand-in</title>
    <style nonce="${nonce}">${style}</style>
  </head>
  <body>
    <header><p><b>Stand-in for sign-in</b> <span>for development only, on this computer</span></p></header>
    <main>${body}</main>
  </body>
</html>`;
}

const escapes: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

function escapeHtml(text: string): string {
  return text.replaceAll(/[&<>"']/g, (character) => escapes[character] ?? '');
}

// The product's colours and type (frontend/src/styles/tokens.css); this page loads nothing of it.
const style = `
@font-face { font-family: 'Work Sans'; font-weight: 400; font-display: swap; src: url(/fonts/400.woff2) format('woff2'); }
@font-face { font-family: 'Work Sans'; font-weight: 600; font-display: swap; src: url(/fonts/600.woff2) format('woff2'); }
:root { color-scheme: light; --foam: #f5f9f8; --paper: #fff; --wash: #e7f0f1; --sand: #eedcad; --edge: #6a7c81; --ink: #0f272d; --deep: #0a5465; --barnacle: #526266; --on-deep: #fff; }
@media (prefers-color-scheme: dark) { :root { color-scheme: dark; --foam: #0b1b20; --paper: #11272d; --wash: #14292f; --sand: #4a3f1e; --edge: #75909a; --ink: #e6f0ef; --deep: #8acfda; --barnacle: #a5b7ba; --on-deep: #08191e; } }
* { box-sizing: border-box; margin: 0; }
body { background: var(--foam); color: var(--ink); font: 400 1rem/1.5 'Work Sans', system-ui, sans-serif; }
header { background: var(--sand); padding: .75rem 1.25rem; }
header p { max-width: 37.5rem; margin: 0 auto; }
main { max-width: 40rem; margin: 0 auto; }
main { padding: 2rem 1.25rem 4rem; }
h1 { font-size: 2rem; line-height: 1.15; letter-spacing: -.018em; text-wrap: balance; }
h2 { font-size: 1rem; font-weight: 600; color: var(--barnacle); margin: 2rem 0 .75rem; }
.lead { margin: .75rem 0 1.5rem; color: var(--barnacle); }
ul { list-style: none; padding: 0; display: grid; gap: .5rem; }
button { font: inherit; color: inherit; min-height: 2.75rem; border-radius: 3px; cursor: pointer; }
li button { display: grid; gap: .125rem; width: 100%; padding: .75rem 1rem; text-align: left; background: var(--paper); border: 1px solid var(--edge); }
li button:hover { background: var(--wash); border-color: var(--deep); }
button:focus-visible { outline: 3px solid var(--deep); outline-offset: 2px; }
.who { display: flex; flex-wrap: wrap; justify-content: space-between; gap: 0 1rem; }
.who i { font-style: normal; color: var(--deep); }
b { font-weight: 600; }
small { font-size: .875rem; color: var(--barnacle); overflow-wrap: anywhere; }
.quiet { margin-top: 2rem; padding: 0 .25rem; background: none; border: 0; color: var(--deep); text-decoration: underline; }
.plain { padding: 0 1.25rem; background: var(--deep); color: var(--on-deep); border: 0; font-weight: 600; }
`;
