import { inject, Injectable } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** Puts the page's name before the product's in the tab; pages that learn their name later say it with `show`. */
@Injectable({ providedIn: 'root' })
export class PageTitle extends TitleStrategy {
  private readonly title = inject(Title);

  override updateTitle(state: RouterStateSnapshot): void {
    this.show(this.buildTitle(state));
  }

  show(name: string | undefined): void {
    this.title.setTitle(name ? `${name} · Stillstroke` : 'Stillstroke');
  }
}
