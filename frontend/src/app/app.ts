import { ChangeDetectionStrategy, Component } from '@angular/core';
import { Shell } from './core/shell/shell';

/** The whole application: one shell around the routed page. */
@Component({
  selector: 'dp-root',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Shell],
  template: '<dp-shell />',
})
export class App {}
