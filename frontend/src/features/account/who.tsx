import { Button } from '#frontend/components/button.tsx';
import type { AccountView } from './account.queries.ts';
import { useSignOut } from './use-sign-out.ts';

/** Who is signed in, as what, and the way out. */
export function Who({ person }: { person: NonNullable<AccountView['person']> }) {
  const signOut = useSignOut();
  const roles = person.roles.filter((role) => role !== 'volunteer');
  return (
    <div className="flex items-center gap-4 max-wide:gap-3">
      <div className="text-ui leading-tight font-medium max-wide:text-right max-wide:text-sm">
        {person.name}
        <span className="block text-xs font-normal text-barnacle max-wide:hidden">
          {roles.length === 0 ? 'volunteer' : roles.join(', ')}
        </span>
      </div>
      <div className="whitespace-nowrap">
        <Button look="plain" isBusy={signOut.isPending} onPress={() => signOut.mutate()}>
          Sign out
        </Button>
        {signOut.error !== null && (
          <p role="alert" className="text-xs text-anemone">
            Not signed out. Try again.
          </p>
        )}
      </div>
    </div>
  );
}
