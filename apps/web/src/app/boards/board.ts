import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Page } from '../shell/page';

@Component({
  selector: 'tg-board',
  imports: [Page],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tg-page heading="Board" />`,
})
export class Board {}
