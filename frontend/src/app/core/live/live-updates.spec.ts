import { TestBed } from '@angular/core/testing';
import { Subject } from 'rxjs';
import { LIVE_STREAM, LiveUpdates } from './live-updates';

describe('LiveUpdates', () => {
  function live() {
    const streams = new Map<string, Subject<string>>();
    const open = (url: string): Subject<string> => {
      const stream = new Subject<string>();
      streams.set(url, stream);
      return stream;
    };
    TestBed.configureTestingModule({ providers: [{ provide: LIVE_STREAM, useValue: open }] });
    return { updates: TestBed.inject(LiveUpdates), streams };
  }

  const edit = (revision: number) =>
    JSON.stringify({ revision, by: 'M. Sato', byId: 'p2', at: '', summary: 'I_sp', moved: [] });

  it('raises the revision with every message and passes on edits only', () => {
    const { updates, streams } = live();
    const heard: number[] = [];
    updates.events.subscribe((event) => heard.push(event.revision));
    updates.follow('PETREL');
    const stream = streams.get('/api/studies/PETREL/events');
    stream?.next(JSON.stringify({ revision: 418 }));
    expect([updates.revision(), heard.length]).toEqual([418, 0]);
    stream?.next(edit(419));
    stream?.next('not json');
    stream?.next(JSON.stringify({ kind: 'newer' }));
    expect([updates.revision(), heard]).toEqual([419, [419]]);
    // A late message never takes a view back.
    stream?.next(edit(417));
    expect(updates.revision()).toBe(419);
  });

  it('leaves one study when another is opened', () => {
    const { updates, streams } = live();
    updates.follow('PETREL');
    streams.get('/api/studies/PETREL/events')?.next(edit(419));
    updates.follow('CINDER');
    expect(updates.revision()).toBe(0);
    expect(streams.get('/api/studies/PETREL/events')?.observed).toBe(false);
    updates.follow(undefined);
    expect(streams.get('/api/studies/CINDER/events')?.observed).toBe(false);
  });
});
