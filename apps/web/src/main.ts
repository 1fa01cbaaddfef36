import { bootstrapApplication } from '@angular/platform-browser';
import { appConfig } from './app/app.config';
import { Shell } from './app/shell/shell';

bootstrapApplication(Shell, appConfig).catch((error: unknown) => {
  // Nothing of the app stands at this point: the browser's own report is all there is.
  reportError(error);
});
