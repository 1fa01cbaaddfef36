import { APP_BASE_HREF } from '@angular/common';
import { provideHttpClient, withFetch, withInterceptors } from '@angular/common/http';
import { ErrorHandler, provideBrowserGlobalErrorListeners, type ApplicationConfig } from '@angular/core';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
  withRouterConfig,
} from '@angular/router';
import { csrfInterceptor } from './api/csrf-interceptor';
import { problemInterceptor } from './api/problem-interceptor';
import { routes } from './app.routes';
import { PageTitle } from './shell/page-title';
import { UnexpectedErrors } from './shell/unexpected-errors';

/**
 * Where things are: `api` requests, problems, the event stream; `session` who is signed in; `theme` the palette for canvas;
 * `marks` verdicts and glyphs; `states` loading, empty, failure, toasts; `forms` validators from schemas, fields, server errors;
 * `table` the one data table; `dialogs` opening and confirming; `shell` the frame, `tg-page`, `tgBar`; then one folder a feature.
 */
export const appConfig: ApplicationConfig = {
  providers: [
    // No <base> in the page: its content policy refuses one.
    { provide: APP_BASE_HREF, useValue: '/' },
    provideBrowserGlobalErrorListeners(),
    provideHttpClient(withFetch(), withInterceptors([csrfInterceptor, problemInterceptor])),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled' }),
      withRouterConfig({ paramsInheritanceStrategy: 'always' }),
    ),
    { provide: TitleStrategy, useExisting: PageTitle },
    { provide: ErrorHandler, useExisting: UnexpectedErrors },
  ],
};
