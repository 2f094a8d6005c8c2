import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { pageFindings } from '../core/testing/page-findings';
import { SignInPage } from './sign-in-page';

const demo = {
  password: 'stillwater-demo',
  accounts: [
    {
      email: 'coach@tarnvalley.example',
      name: 'Owen Hale',
      role: 'coach',
      clubName: 'Tarn Valley Swim Club',
    },
  ],
};
const user = {
  id: 'u1',
  name: 'Owen Hale',
  email: 'coach@tarnvalley.example',
  role: 'coach',
  clubId: 'c1',
  clubName: 'Tarn Valley Swim Club',
  athleteId: null,
};

describe('SignInPage', () => {
  let server: HttpTestingController;
  let page: RouterTestingHarness;

  async function open(address: string, answer: object) {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'sign-in', component: SignInPage },
            { path: '**', children: [] },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    server = TestBed.inject(HttpTestingController);
    page = await RouterTestingHarness.create();
    await page.navigateByUrl(address);
    await vi.waitFor(() => server.expectOne('/api/auth/page').flush(answer));
    await page.fixture.whenStable();
    return TestbedHarnessEnvironment.loader(page.fixture);
  }

  const host = () => page.fixture.nativeElement as HTMLElement;

  it('signs in as a demo account with one press and goes back to where the person wanted to be', async () => {
    await open('/sign-in?back=%2Fclips%2Fc9', { demo });
    host().querySelector<HTMLButtonElement>('li button')?.click();
    const request = server.expectOne('/api/auth/sign-in');
    expect(request.request.body).toEqual({ email: 'coach@tarnvalley.example', password: 'stillwater-demo' });
    request.flush({ user });
    await vi.waitFor(() => expect(TestBed.inject(Router).url).toBe('/clips/c9'));
  });

  it('says in words that the credentials are wrong and lets the person try again', async () => {
    const loader = await open('/sign-in', { demo: null });
    const [email, password] = await loader.getAllHarnesses(MatInputHarness);
    await email?.setValue('coach@tarnvalley.example');
    await password?.setValue('guess');
    const submit = await loader.getHarness(MatButtonHarness.with({ text: 'Sign in' }));
    await submit.click();
    server
      .expectOne('/api/auth/sign-in')
      .flush(
        { type: 'about:blank', title: 't', status: 401, detail: 'd', code: 'wrong-credentials' },
        { status: 401, statusText: '' },
      );
    await page.fixture.whenStable();
    expect(host().querySelector('[role=alert]')?.textContent).toContain('do not go together');
    expect(await submit.isDisabled()).toBe(false);
  });

  it('sends nothing while a field is empty, and offers no demo when there is none', async () => {
    const loader = await open('/sign-in', { demo: null });
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Sign in' }))).click();
    server.expectNone('/api/auth/sign-in');
    expect(host().textContent).toContain('Give your password');
    expect(host().textContent).not.toContain('demo');
  });

  it('has nothing for axe to find', async () => {
    await open('/sign-in', { demo });
    expect(await pageFindings(host())).toEqual([]);
  });
});
