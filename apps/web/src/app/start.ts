import { bootstrapApplication } from '@angular/platform-browser';
import { appConfig } from './app.config';
import { Shell } from './shell/shell';

export async function start(): Promise<void> {
  await bootstrapApplication(Shell, appConfig);
}
