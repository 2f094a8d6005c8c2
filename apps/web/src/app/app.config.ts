import { provideHttpClient, withInterceptors } from '@angular/common/http';
import {
  ErrorHandler,
  inject,
  provideAppInitializer,
  provideBrowserGlobalErrorListeners,
  type ApplicationConfig,
} from '@angular/core';
import {
  provideRouter,
  TitleStrategy,
  withComponentInputBinding,
  withInMemoryScrolling,
  withRouterConfig,
} from '@angular/router';
import { routes } from './app.routes';
import { ErrorWatch } from './core/errors/error-watch';
import { PageTitle } from './core/page-title';
import { signInInterceptor } from './core/sign-in/sign-in-interceptor';
import { SignInState } from './core/sign-in/sign-in-state';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    { provide: ErrorHandler, useClass: ErrorWatch },
    // XMLHttpRequest and not fetch: only it reports how far an upload is.
    provideHttpClient(withInterceptors([signInInterceptor])),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
      withRouterConfig({ paramsInheritanceStrategy: 'always' }),
    ),
    { provide: TitleStrategy, useExisting: PageTitle },
    provideAppInitializer(() => inject(SignInState).load()),
  ],
};
