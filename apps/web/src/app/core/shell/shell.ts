import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  inject,
  Injector,
  signal,
  viewChild,
  type ElementRef,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterOutlet, type ActivatedRouteSnapshot } from '@angular/router';
import { filter } from 'rxjs';
import { Connection } from '../connection';
import { TopBar } from './top-bar';

/** What stands around every page. A page whose route says `fullPage` has its own bar and gets the whole window. */
@Component({
  selector: 'st-shell',
  imports: [RouterOutlet, TopBar],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  private readonly router = inject(Router);
  private readonly injector = inject(Injector);

  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');

  protected readonly online = inject(Connection).online;
  protected readonly fullPage = signal(false);
  private path: string | null = null;

  constructor() {
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        takeUntilDestroyed(),
      )
      .subscribe((event) => this.arrive(event.urlAfterRedirects));
  }

  protected skipToMain(event: Event): void {
    event.preventDefault();
    this.main().nativeElement.focus();
  }

  /** Moves the reading place to the new page; not on the first page, and not when only its filters changed. */
  private arrive(url: string): void {
    this.fullPage.set(wantsFullPage(this.router.routerState.snapshot.root));
    const path = url.replace(/[?#].*$/, '');
    const isNew = this.path !== null && this.path !== path;
    this.path = path;
    if (!isNew) return;
    afterNextRender(
      () => {
        const main = this.main().nativeElement;
        const heading = main.querySelector<HTMLElement>('h1');
        heading?.setAttribute('tabindex', '-1');
        (heading ?? main).focus({ preventScroll: true });
      },
      { injector: this.injector },
    );
  }
}

function wantsFullPage(route: ActivatedRouteSnapshot): boolean {
  return route.data['fullPage'] === true || route.children.some(wantsFullPage);
}
