import { provideHttpClient, withInterceptors } from '@angular/common/http';
import {
  type ApplicationConfig,
  ErrorHandler,
  inject,
  provideAppInitializer,
  provideZonelessChangeDetection,
} from '@angular/core';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { provideRouter, withComponentInputBinding, withInMemoryScrolling } from '@angular/router';
import { routes } from './app.routes';
import { ErrorLineHandler } from './core/errors/error-line';
import { apiInterceptor } from './core/http/api-interceptor';
import { Appearance } from './core/preferences/appearance';

export const appConfig: ApplicationConfig = {
  providers: [
    provideZonelessChangeDetection(),
    provideHttpClient(withInterceptors([apiInterceptor])),
    provideRouter(
      routes,
      withComponentInputBinding(),
      withInMemoryScrolling({ scrollPositionRestoration: 'enabled', anchorScrolling: 'enabled' }),
    ),
    { provide: ErrorHandler, useClass: ErrorLineHandler },
    { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
    // The theme is set before the first paint.
    provideAppInitializer(() => {
      inject(Appearance);
    }),
  ],
};
