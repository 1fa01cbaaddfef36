import { inject, Injectable } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** Titles of the browser's tab: from the route, and made precise by pages that know a name. */
@Injectable({ providedIn: 'root' })
export class PageTitle extends TitleStrategy {
  private readonly title = inject(Title);

  override updateTitle(snapshot: RouterStateSnapshot): void {
    this.set(this.buildTitle(snapshot) ?? '');
  }

  /** "Lane 3, Heron line card": the page's own name in front of the product's. */
  set(name: string): void {
    this.title.setTitle(name === '' ? 'Tollgate' : `${name} · Tollgate`);
  }
}
