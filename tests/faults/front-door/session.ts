import { ask, type RawAnswer, type RunningServer } from '../server.ts';

/** A browser's cookies for one server, kept from answer to answer. */
export class Browser {
  readonly cookies = new Map<string, string>();

  constructor(
    readonly server: RunningServer,
    /** Headers of every request: those a proxy in front sets. */
    readonly always: Record<string, string> = {},
  ) {}

  get cookie(): string {
    return [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
  }

  async send(
    path: string,
    { headers = {}, ...rest }: { method?: string; headers?: Record<string, string>; body?: string } = {},
  ): Promise<RawAnswer> {
    const answer = await ask(this.server.port, path, {
      ...rest,
      headers: { ...this.always, ...(this.cookies.size > 0 ? { cookie: this.cookie } : {}), ...headers },
    });
    for (const line of answer.headers['set-cookie'] ?? []) {
      const [, name, value] = /^([^=]+)=([^;]*)/.exec(line)!;
      if (value === '' || /max-age=0\b/i.test(line)) this.cookies.delete(name!);
      else this.cookies.set(name!, value!);
    }
    return answer;
  }

  /** Post a form of the sign-in library, with its token, from one of our pages. */
  async form(path: string, fields: Record<string, string>, origin = this.server.origin): Promise<RawAnswer> {
    const { csrfToken } = JSON.parse((await this.send('/api/auth/csrf')).text) as { csrfToken: string };
    return this.send(path, {
      method: 'POST',
      headers: { 'content-type': 'application/x-www-form-urlencoded', origin },
      body: new URLSearchParams({ ...fields, csrfToken }).toString(),
    });
  }

  signIn(email: string, password: string, callbackUrl = '/', origin = this.server.origin): Promise<RawAnswer> {
    return this.form('/api/auth/callback/credentials', { email, password, callbackUrl }, origin);
  }

  get signedIn(): boolean {
    return [...this.cookies.keys()].some((name) => name.includes('session-token'));
  }
}
