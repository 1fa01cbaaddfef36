import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Page } from '../shell/page';

@Component({
  selector: 'tg-people',
  imports: [Page],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tg-page heading="People" />`,
})
export class People {}
