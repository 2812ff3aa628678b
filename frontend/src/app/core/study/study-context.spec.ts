import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { EMPTY } from 'rxjs';
import { LIVE_STREAM } from '../live/live-updates';
import { StudyContext } from './study-context';

@Component({ selector: 'dp-blank', changeDetection: ChangeDetectionStrategy.OnPush, template: '' })
class Blank {}

describe('StudyContext', () => {
  function opened() {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'studies/:study/overview', component: Blank },
          { path: '', component: Blank },
        ]),
        { provide: LIVE_STREAM, useValue: () => EMPTY },
      ],
    });
    return { context: TestBed.inject(StudyContext), router: TestBed.inject(Router) };
  }

  it('follows the standpoint also when nothing but it changes in the address', async () => {
    const { context, router } = opened();
    await router.navigateByUrl('/studies/PETREL/overview');
    expect([context.study(), context.at()]).toEqual(['PETREL', undefined]);
    await context.lookFrom({ kind: 'baseline', key: 'B2' });
    expect(router.url).toBe('/studies/PETREL/overview?at=baseline:B2');
    expect([context.study(), context.at()]).toEqual(['PETREL', 'baseline:B2']);
    await context.lookFrom({ kind: 'now' });
    expect(context.at()).toBeUndefined();
  });

  it('leaves the study with its address', async () => {
    const { context, router } = opened();
    await router.navigateByUrl('/studies/PETREL/overview?at=draft:CR-004');
    expect(context.standpoint()).toEqual({ kind: 'draft', key: 'CR-004' });
    await router.navigateByUrl('/');
    expect(context.study()).toBeUndefined();
  });
});
