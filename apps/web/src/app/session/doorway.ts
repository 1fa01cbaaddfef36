import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** The frame of the pages before one is in: words on the left, on wide screens a drawing of what the product is about. */
@Component({
  selector: 'tg-doorway',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './doorway.html',
  styleUrl: './doorway.scss',
})
export class Doorway {
  readonly heading = input.required<string>();
  readonly lead = input('');
}
