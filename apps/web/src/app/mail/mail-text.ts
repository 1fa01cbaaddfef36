import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

interface Piece {
  readonly text: string;
  readonly link: boolean;
}

/** The plain text of a mail, with its addresses as links. */
@Component({
  selector: 'tg-mail-text',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (piece of pieces(); track $index) {
      @if (piece.link) {
        <a [href]="piece.text">{{ piece.text }}</a>
      } @else {
        <span>{{ piece.text }}</span>
      }
    }
  `,
  styles: `
    :host {
      display: block;
      max-width: 72ch;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }
  `,
})
export class MailText {
  readonly text = input.required<string>();

  protected readonly pieces = computed<readonly Piece[]>(() =>
    this.text()
      .split(/(https?:\/\/[^\s<>"]+)/)
      .map((text, index) => ({ text, link: index % 2 === 1 })),
  );
}
