import {
  HttpClient,
  HttpXsrfTokenExtractor,
  provideHttpClient,
  withInterceptors,
} from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { signInInterceptor } from './sign-in-interceptor';
import { SignInState } from './sign-in-state';

const problem = (code: string, status: number) => ({
  type: 'about:blank',
  title: code,
  status,
  detail: code,
  code,
});

describe('signInInterceptor', () => {
  let http: HttpClient;
  let server: HttpTestingController;
  let token: string;

  beforeEach(() => {
    token = 'old';
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([signInInterceptor])),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
        { provide: HttpXsrfTokenExtractor, useValue: { getToken: () => token } },
      ],
    });
    http = TestBed.inject(HttpClient);
    server = TestBed.inject(HttpTestingController);
  });

  afterEach(() => server.verify());

  it('leads to the sign-in page with the way back when the sign-in has ended', async () => {
    const router = TestBed.inject(Router);
    await router.navigateByUrl('/clips/c1?frame=3');
    const answer = firstValueFrom(http.get('/api/clips/c1'));
    server.expectOne('/api/clips/c1').flush(problem('not-signed-in', 401), { status: 401, statusText: '' });
    await expect(answer).rejects.toMatchObject({ status: 401 });
    await vi.waitFor(() => expect(router.url).toContain('/sign-in'));
    expect(router.parseUrl(router.url).queryParams['back']).toBe('/clips/c1?frame=3');
    expect(TestBed.inject(SignInState).user()).toBeNull();
  });

  it('does not take wrong credentials for an ended sign-in', async () => {
    const answer = firstValueFrom(http.post('/api/auth/sign-in', {}));
    server
      .expectOne('/api/auth/sign-in')
      .flush(problem('wrong-credentials', 401), { status: 401, statusText: '' });
    await expect(answer).rejects.toMatchObject({ status: 401 });
    expect(TestBed.inject(Router).url).toBe('/');
  });

  it('fetches a fresh token and sends the change once more when the token is out of date', async () => {
    const answer = firstValueFrom(http.post('/api/squads', { name: 'Masters' }));
    server.expectOne('/api/squads').flush(problem('csrf', 403), { status: 403, statusText: '' });
    token = 'fresh';
    server.expectOne('/api/auth/page').flush({ demo: null });
    const again = server.expectOne('/api/squads');
    expect(again.request.headers.get('X-XSRF-TOKEN')).toBe('fresh');
    expect(again.request.body).toEqual({ name: 'Masters' });
    again.flush({ id: 's1' });
    await expect(answer).resolves.toEqual({ id: 's1' });
  });

  it('gives up when the fresh token is refused too', async () => {
    const answer = firstValueFrom(http.post('/api/squads', {}));
    server.expectOne('/api/squads').flush(problem('csrf', 403), { status: 403, statusText: '' });
    server.expectOne('/api/auth/page').flush({ demo: null });
    server.expectOne('/api/squads').flush(problem('csrf', 403), { status: 403, statusText: '' });
    await expect(answer).rejects.toMatchObject({ status: 403 });
  });
});
