import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  viewChild,
  type ElementRef,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { distinctUntilChanged, filter, map, skip } from 'rxjs';
import { Availability } from '../api/availability';
import { GateMark } from '../marks/gate-mark';
import { paths } from '../paths';
import { SessionStore } from '../session/session-store';
import { Loading } from '../states/loading';
import { ToastList } from '../states/toast-list';
import { BarContent } from './bar-content';
import { PersonMenu } from './person-menu';
import type { Place } from './place';

/** The frame around every screen: bar, navigation, notices, and the place where pages appear. */
@Component({
  selector: 'tg-shell',
  imports: [
    GateMark,
    Loading,
    NgTemplateOutlet,
    PersonMenu,
    RouterLink,
    RouterLinkActive,
    RouterOutlet,
    ToastList,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
})
export class Shell {
  protected readonly session = inject(SessionStore);
  protected readonly away = inject(Availability).away;
  protected readonly bar = inject(BarContent).template;
  protected readonly paths = paths;

  /** Only what works and what the person may see. */
  protected readonly places = computed<readonly Place[]>(() => {
    if (this.session.person() === null) return [];
    return [
      { name: 'Boards', link: paths.boards },
      ...(this.session.may('people.list') ? [{ name: 'People', link: paths.people }] : []),
      ...(this.session.demonstration() ? [{ name: 'Mail', link: paths.mail }] : []),
    ];
  });

  private readonly content = viewChild.required<ElementRef<HTMLElement>>('content');

  constructor() {
    // A new page starts at its beginning for the keyboard and the screen reader too; a change of the query is no new page.
    inject(Router)
      .events.pipe(
        filter((event) => event instanceof NavigationEnd),
        map((event) => event.urlAfterRedirects.split('?')[0]),
        distinctUntilChanged(),
        skip(1),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.content().nativeElement.focus({ preventScroll: true }));
  }

  /** A fragment link would go through the base address: the focus is moved by hand. */
  protected skipToContent(content: HTMLElement, event: Event): void {
    event.preventDefault();
    content.focus();
  }
}
