import { provideHttpClient, withInterceptors } from '@angular/common/http';
import {
  HttpTestingController,
  provideHttpClientTesting,
  type TestRequest,
} from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import type { Type } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, withComponentInputBinding, withRouterConfig } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { SignedInUser } from '@stillstroke/contract/auth';
import { signInInterceptor } from '../sign-in/sign-in-interceptor';
import { SignInState } from '../sign-in/sign-in-state';

export const coach: SignedInUser = {
  id: 'coach-1',
  name: 'Owen Hale',
  email: 'coach@tarnvalley.example',
  role: 'coach',
  clubId: 'club-1',
  clubName: 'Tarn Valley Swim Club',
  athleteId: null,
};
export const athlete: SignedInUser = {
  ...coach,
  id: 'user-2',
  name: 'Ines Corrow',
  email: 'athlete@tarnvalley.example',
  role: 'athlete',
  athleteId: 'ines',
};
export const admin: SignedInUser = { ...coach, id: 'admin-1', name: 'Petra Lund', role: 'admin' };

/** One page behind its real router and HTTP client; the server's answers are given by the test. */
export class PageTest {
  private constructor(
    readonly page: RouterTestingHarness,
    readonly server: HttpTestingController,
  ) {}

  /** Opens a page that stands at `path` under an address, as `user`. */
  static async open(
    path: string,
    component: Type<unknown>,
    address: string,
    user: SignedInUser | null,
  ): Promise<PageTest> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([signInInterceptor])),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path, component },
            { path: '**', children: [] },
          ],
          withComponentInputBinding(),
          withRouterConfig({ paramsInheritanceStrategy: 'always' }),
        ),
      ],
    });
    const server = TestBed.inject(HttpTestingController);
    if (user) {
      const known = TestBed.inject(SignInState).load();
      server.expectOne('/api/auth/me').flush({ user });
      await known;
    }
    const page = await RouterTestingHarness.create();
    const test = new PageTest(page, server);
    await page.navigateByUrl(address);
    return test;
  }

  get element(): HTMLElement {
    return this.page.fixture.nativeElement as HTMLElement;
  }

  get text(): string {
    return this.element.textContent?.replace(/\s+/g, ' ').trim() ?? '';
  }

  /** Harnesses of what is in the page. */
  get loader() {
    return TestbedHarnessEnvironment.loader(this.page.fixture);
  }

  /** Harnesses of the whole document: dialogs, menus and the words at the foot of the page. */
  get overlays() {
    return TestbedHarnessEnvironment.documentRootLoader(this.page.fixture);
  }

  get url(): string {
    return TestBed.inject(Router).url;
  }

  /**
   * Presses a button or link by its words, anywhere in the document. Unlike a harness it does not wait until
   * everything is answered, so the test can answer what the press asked for.
   */
  press(words: string): void {
    const found = [
      ...document.querySelectorAll<HTMLElement>('button, a, [role=menuitem], [role=tab]'),
    ].filter(
      (each) =>
        (each.getAttribute('aria-label') ?? each.textContent ?? '').replace(/\s+/g, ' ').trim() === words,
    );
    const last = found.at(-1);
    if (!last) throw new Error(`There is nothing to press that says "${words}".`);
    last.click();
  }

  /** Waits for one request whose method and address (without query) fit. */
  async request(method: string, path: string): Promise<TestRequest> {
    const fits = (request: { method: string; url: string; urlWithParams: string }) =>
      request.method === method && request.urlWithParams.split('?')[0] === path;
    return vi.waitFor(() => this.server.expectOne(fits));
  }

  async answer(method: string, path: string, body: object | null): Promise<TestRequest> {
    const request = await this.request(method, path);
    request.flush(body);
    await this.settle();
    return request;
  }

  async refuse(method: string, path: string, status: number, code: string, more: object = {}): Promise<void> {
    const request = await this.request(method, path);
    request.flush(
      { type: 'about:blank', title: code, status, detail: `Refused: ${code}.`, code, ...more },
      {
        status,
        statusText: code,
      },
    );
    await this.settle();
  }

  /** Waits until what was answered stands on the page (requests that are still open do not count). */
  async settle(): Promise<void> {
    await Promise.resolve();
    await new Promise((done) => requestAnimationFrame(done));
    await Promise.race([this.page.fixture.whenStable(), new Promise((done) => setTimeout(done, 50))]);
  }
}
