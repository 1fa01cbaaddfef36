import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Page } from '../shell/page';

@Component({
  selector: 'tg-revision',
  imports: [Page],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tg-page heading="Revision" />`,
})
export class RevisionPage {}
