import { useMutation, useQuery } from '@tanstack/react-query';
import type { AddressChangePreview, AddressConfirmation } from '../../contracts/account.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { minute } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { sendJson } from '../ui/http.ts';
import { Facts } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import { useLinkToken } from './link-token.ts';

/** What a link of a change of address would confirm, and the button that does: opening it alone changes nothing. */
export function ConfirmAddress() {
  const { token } = useLinkToken();
  if (token === undefined) return <p role="status">Reading the link…</p>;
  if (token === null)
    return (
      <EmptyState title="No link here" action={<ButtonLink href="/account">Your account</ButtonLink>}>
        Open the link in the mail once more, the whole of it: the part after # says what it confirms.
      </EmptyState>
    );
  return <Confirmation token={token} />;
}

function Confirmation({ token }: { token: string }) {
  const link = useQuery(
    {
      queryKey: ['address-change', token],
      queryFn: ({ signal }) =>
        sendJson<AddressChangePreview>('POST', '/api/account/address/preview', { token }, { signal }),
      refetchOnWindowFocus: false,
    },
    queryClient,
  );
  const confirm = useMutation(
    { mutationFn: () => sendJson<AddressConfirmation>('POST', '/api/account/address/confirm', { token }) },
    queryClient,
  );
  if (confirm.data)
    return (
      <div role="status" className="flex flex-col gap-4">
        <p>
          {confirm.data.done
            ? `The account has the address ${confirm.data.newEmail} now. Sign in with it from here on.`
            : 'This address has confirmed. The change takes effect when the other one has, too.'}
        </p>
        {confirm.data.done && <ButtonLink href="/account">Your account</ButtonLink>}
      </div>
    );
  if (link.error) return <Problem problem={link.error} onRetry={() => void link.refetch()} />;
  if (!link.data) return <p role="status">Reading the link…</p>;
  const { email, newEmail, confirmed, expiresAt } = link.data;
  return (
    <div className="flex flex-col gap-5">
      <Facts
        facts={[
          ['New address', newEmail],
          ['Confirming', email === newEmail ? 'the new address' : `the present address, ${email}`],
          ['Until', minute(expiresAt)],
        ]}
      />
      {confirmed ? (
        <p role="status">This address has confirmed. The change takes effect when the other one has, too.</p>
      ) : (
        <>
          <p className="text-ink-soft">Nothing changes until both addresses have confirmed.</p>
          <Problem problem={confirm.error} />
          <Button kind="primary" disabled={confirm.isPending} onClick={() => confirm.mutate()}>
            {confirm.isPending ? 'Confirming' : 'Confirm the change'}
          </Button>
        </>
      )}
    </div>
  );
}
