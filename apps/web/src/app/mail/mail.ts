import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Page } from '../shell/page';

@Component({
  selector: 'tg-mail',
  imports: [Page],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tg-page heading="Mail" />`,
})
export class Mail {}
