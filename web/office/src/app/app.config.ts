import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { type ApplicationConfig, provideBrowserGlobalErrorListeners } from '@angular/core';
import { TitleStrategy, provideRouter, withComponentInputBinding, withInMemoryScrolling } from '@angular/router';
import { provideMaterialDefaults } from '#ui/material-defaults';
import { routes } from './app.routes';
import { sessionInterceptor } from './session/session-interceptor';
import { PageTitle } from './shell/page-title';

export const appConfig: ApplicationConfig = {
  providers: [
    provideBrowserGlobalErrorListeners(),
    provideRouter(routes, withComponentInputBinding(), withInMemoryScrolling({ scrollPositionRestoration: 'enabled' })),
    provideHttpClient(withInterceptors([sessionInterceptor])),
    provideMaterialDefaults(),
    { provide: TitleStrategy, useClass: PageTitle },
  ],
};
