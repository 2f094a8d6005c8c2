import type { Method } from '@stillstroke/contract/endpoint';
import type { Express } from 'express';
import request, { type Test } from 'supertest';

export type Change = Exclude<Method, 'get'>;

/** A browser for tests: keeps cookies, and sends the CSRF token along as the web app does. */
export class TestBrowser {
  private readonly agent: ReturnType<typeof request.agent>;

  constructor(private readonly app: Express) {
    this.agent = request.agent(app);
  }

  /** @throws when the sign-in is refused */
  static async signedIn(app: Express, email: string, password: string): Promise<TestBrowser> {
    const browser = new TestBrowser(app);
    const answer = await browser.signIn(email, password);
    if (answer.status !== 200) throw new Error(`${email} cannot sign in: ${answer.status}`);
    return browser;
  }

  async signIn(email: string, password: string) {
    await this.get('/api/auth/page');
    return this.mutate('post', '/api/auth/sign-in').send({ email, password });
  }

  get(path: string): Test {
    return this.agent.get(path);
  }

  /** A change with the CSRF token, as far as a GET or a sign-in has set one. */
  mutate(method: Change, path: string): Test {
    const token = this.cookie('XSRF-TOKEN');
    const call = this.agent[method](path);
    return token === undefined ? call : call.set('X-XSRF-TOKEN', token);
  }

  /** A change as a foreign page would send it: with the cookies, without the token. */
  mutateWithoutToken(method: Change, path: string): Test {
    return this.agent[method](path);
  }

  /** A call with this browser's cookies and token that leaves them as they are, whatever is answered. */
  bare(method: Method, path: string): Test {
    const names = ['stillstroke', 'XSRF-TOKEN'];
    const cookies = names.flatMap((name) => {
      const value = this.cookie(name);
      return value === undefined ? [] : [`${name}=${value}`];
    });
    return request(this.app)
      [method](path)
      .set({ Cookie: cookies.join('; '), 'X-XSRF-TOKEN': this.cookie('XSRF-TOKEN') ?? '' });
  }

  cookie(name: string): string | undefined {
    const access = { domain: '127.0.0.1', path: '/api/auth', secure: false, script: false };
    return this.agent.jar.getCookie(name, access)?.value;
  }
}
