import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  viewChild,
  type ElementRef,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink } from '@angular/router';
import { filter, map } from 'rxjs';
import { PlumbSign } from '../../ui/plumb-sign';
import { SignInState } from '../sign-in/sign-in-state';
import { destinationsOf, liesIn } from './navigation';

/** The bar over every reading page: the sign of the house, the areas, who is signed in. */
@Component({
  selector: 'st-top-bar',
  imports: [PlumbSign, RouterLink],
  templateUrl: './top-bar.html',
  styleUrl: './top-bar.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TopBar {
  private readonly state = inject(SignInState);
  private readonly router = inject(Router);

  private readonly menu = viewChild<ElementRef<HTMLElement>>('menu');

  protected readonly user = this.state.user;
  private readonly url = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      map((event) => event.urlAfterRedirects),
    ),
    { initialValue: this.router.url },
  );
  protected readonly destinations = computed(() =>
    destinationsOf(this.user()).map((to) => ({ ...to, here: liesIn(to, this.url(), this.user()) })),
  );

  /** Those who place marks. */
  protected readonly marks = computed(() => ['coach', 'admin'].includes(this.user()?.role ?? ''));

  protected closeMenu(): void {
    this.menu()?.nativeElement.hidePopover();
  }

  protected signOut(): void {
    this.state.signOut().subscribe(() => void this.router.navigateByUrl('/sign-in'));
  }
}
