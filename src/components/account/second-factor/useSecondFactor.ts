import { type PublicKeyCredentialCreationOptionsJSON, startRegistration } from '@simplewebauthn/browser';
import { useMutation, useQuery } from '@tanstack/react-query';
import type { FactorOverview, RecoveryCodes, TotpStarted } from '../../../contracts/second-factor.ts';
import { getJson, sendJson } from '../../ui/http.ts';
import { queryClient } from '../../ui/query-client.ts';
import { passkeyFault } from './passkey-fault.ts';

const PATH = '/api/account/second-factor';
const KEY = ['second-factor'];
/** Nothing keeps a password or a secret once it was put away. */
const forgotten = { gcTime: 0, onSuccess: () => queryClient.invalidateQueries({ queryKey: KEY }) };

/** Ask the server, then the authenticator by the browser, then send what that answered. */
async function setUpPasskey({ name, password, endOthers }: { name: string; password: string; endOthers: boolean }) {
  const optionsJSON = await sendJson<PublicKeyCredentialCreationOptionsJSON>('POST', `${PATH}/passkeys/options`, {
    password,
  });
  const response = await startRegistration({ optionsJSON }).catch((error: unknown) => {
    throw passkeyFault(error);
  });
  return sendJson<RecoveryCodes>('POST', `${PATH}/passkeys`, { name, response, endOthers });
}

/** Own second factors, and all that changes them. Secrets live in the answers of these mutations alone. */
export function useSecondFactor() {
  const overview = useQuery(
    { queryKey: KEY, queryFn: ({ signal }) => getJson<FactorOverview>(PATH, signal) },
    queryClient,
  );
  const startApp = useMutation(
    {
      mutationFn: (input: { name: string; password: string }) => sendJson<TotpStarted>('POST', `${PATH}/totp`, input),
      gcTime: 0,
    },
    queryClient,
  );
  const confirmApp = useMutation(
    {
      ...forgotten,
      mutationFn: ({ id, ...input }: { id: string; code: string; endOthers: boolean }) =>
        sendJson<RecoveryCodes>('POST', `${PATH}/totp/${id}/confirm`, input),
    },
    queryClient,
  );
  const addPasskey = useMutation({ ...forgotten, mutationFn: setUpPasskey }, queryClient);
  const remove = useMutation(
    {
      ...forgotten,
      mutationFn: ({ id, password }: { id: string; password: string }) =>
        sendJson('POST', `${PATH}/${id}/remove`, { password }),
    },
    queryClient,
  );
  const renewCodes = useMutation(
    {
      ...forgotten,
      mutationFn: ({ password }: { password: string }) =>
        sendJson<RecoveryCodes>('POST', `${PATH}/recovery-codes`, { password }),
    },
    queryClient,
  );
  return { overview, startApp, confirmApp, addPasskey, remove, renewCodes };
}

export type SecondFactor = ReturnType<typeof useSecondFactor>;
