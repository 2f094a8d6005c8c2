import { Location } from '@angular/common';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import type { SignedInUser } from '@stillstroke/contract/auth';
import { onlyFor, signedIn, toHome } from '../sign-in/guards';
import { NotForYouPage } from '../errors/not-for-you-page';
import { pageFindings } from '../testing/page-findings';
import { admin, athlete, coach } from '../testing/page-test';
import { Shell } from './shell';

@Component({
  selector: 'st-some-page',
  template: '<h1>Some page</h1>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class SomePage {}

describe('Shell', () => {
  async function open(address: string, user: SignedInUser | null) {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: '', pathMatch: 'full', redirectTo: toHome },
          { path: 'squad', component: SomePage, canActivate: [onlyFor('coach', 'admin')] },
          { path: 'club', component: SomePage, canActivate: [onlyFor('admin')] },
          { path: 'clips/:clipId', component: SomePage, canActivate: [signedIn], data: { fullPage: true } },
          { path: 'not-for-you', component: NotForYouPage },
          { path: '**', component: SomePage },
        ]),
      ],
    });
    const fixture = TestBed.createComponent(Shell);
    const arrived = TestBed.inject(Router).navigateByUrl(address);
    const server = TestBed.inject(HttpTestingController);
    await vi.waitFor(() => {
      const [me] = server.match('/api/auth/me');
      if (!me) throw new Error('not asked yet');
      if (user) me.flush({ user });
      else me.flush(null, { status: 401, statusText: 'no' });
    });
    await arrived;
    await fixture.whenStable();
    return { element: fixture.nativeElement as HTMLElement, fixture, server, router: TestBed.inject(Router) };
  }

  const areas = (element: HTMLElement) =>
    [...element.querySelectorAll('nav.wide a')].map((link) => link.textContent?.trim());

  it('offers each role its areas and marks where one is', async () => {
    const { element } = await open('/squad', coach);
    expect(areas(element)).toEqual(['Squad']);
    expect(element.querySelector('nav.wide [aria-current=page]')?.textContent).toContain('Squad');
    expect(element.textContent).toContain('Owen Hale, coach');
    expect(await pageFindings(element)).toEqual([]);
  });

  it('leads everybody from the bare address to where their work starts', async () => {
    expect((await open('/', admin)).router.url).toBe('/squad');
  });

  it('gives an athlete the own pages only', async () => {
    const { element, router } = await open('/', athlete);
    expect(router.url).toBe('/athletes/ines');
    expect(areas(element)).toEqual(['My sessions', 'My trend']);
  });

  it('sends those not signed in to the sign-in page with the way back', async () => {
    const { router } = await open('/clips/c1?frame=12', null);
    const url = router.parseUrl(router.url);
    expect(router.url.startsWith('/sign-in')).toBe(true);
    expect(url.queryParams['back']).toBe('/clips/c1?frame=12');
  });

  it('tells a coach that the club page is not for them and leaves the address', async () => {
    const { element, router } = await open('/squad', coach);
    await router.navigateByUrl('/club');
    expect(element.querySelector('h1')?.textContent).toContain('not for you');
    expect(TestBed.inject(Location).path()).toBe('/squad');
  });

  it('leaves a full page the whole window', async () => {
    const { element } = await open('/clips/c1', coach);
    expect(element.querySelector('st-top-bar')).toBeNull();
    expect(element.querySelector('main h1')).not.toBeNull();
  });

  it('moves the focus to the heading of the next page, and not when only filters change', async () => {
    const { element, router, fixture } = await open('/squad', admin);
    expect(document.activeElement).not.toBe(element.querySelector('h1'));
    await router.navigateByUrl('/squad?sort=lastSession');
    await fixture.whenStable();
    expect(document.activeElement).not.toBe(element.querySelector('h1'));
    await router.navigateByUrl('/club');
    await fixture.whenStable();
    expect(document.activeElement).toBe(element.querySelector('h1'));
  });

  it('signs out and leads to the sign-in page', async () => {
    const { element, router, server } = await open('/squad', coach);
    element.querySelector<HTMLButtonElement>('button.wide')?.click();
    server.expectOne('/api/auth/sign-out').flush(null, { status: 204, statusText: 'ok' });
    await vi.waitFor(() => expect(router.url).toBe('/sign-in'));
  });
});
