import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Page } from '../shell/page';

@Component({
  selector: 'tg-sign-in',
  imports: [Page],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tg-page heading="Sign in" />`,
})
export class SignIn {}
