import { DestroyRef, Directive, inject, Injectable, signal, TemplateRef } from '@angular/core';

/** What a page has put into the top bar in place of the navigation. */
@Injectable({ providedIn: 'root' })
export class BarContent {
  readonly template = signal<TemplateRef<unknown> | undefined>(undefined);
}

/**
 * `<ng-template tgBar>...</ng-template>`: the page takes the top bar between the product's mark and the person's menu
 * (a trail on the left, verdict and actions on the right). The navigation moves into the menu meanwhile.
 */
@Directive({ selector: '[tgBar]' })
export class Bar {
  constructor() {
    const content = inject(BarContent);
    const template = inject<TemplateRef<unknown>>(TemplateRef);
    content.template.set(template);
    inject(DestroyRef).onDestroy(() => {
      if (content.template() === template) content.template.set(undefined);
    });
  }
}
