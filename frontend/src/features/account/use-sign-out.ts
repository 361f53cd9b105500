import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';

/** Ends the sign-in here and leaves for the page that ends it at the provider too. */
export function useSignOut() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: () => call('signOut', {}),
    onSuccess: ({ goTo }) => {
      // Nothing of one person may be seen by the next on the same device.
      queryClient.clear();
      window.location.assign(goTo);
    },
  });
}
