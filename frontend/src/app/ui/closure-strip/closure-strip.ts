import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  ElementRef,
  afterNextRender,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { marginPlace } from '../margin/margin-scale';
import { percentText } from '../margin/margin-text';
import { verdictTone, verdictWord } from '../verdict/verdict-words';
import { type Placed, beeswarm } from './beeswarm';
import { placeNames } from './name-places';
import { type StripMark } from './strip-mark';

const GAP = 12.5;
const LANE = 96;
const TICKS = [-30, -10, -3, 0, 3, 10, 30];
const MOST_NAMES = 6;

/** Every requirement a mark at its margin, limit in the middle, better to the right; the failing ones named. */
@Component({
  selector: 'dp-closure-strip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './closure-strip.html',
  styleUrl: './closure-strip.scss',
})
export class ClosureStrip {
  readonly marks = input.required<readonly StripMark[]>();
  /** A mark was clicked or chosen with Enter: its key. */
  readonly open = output<string>();

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly width = signal(900);
  /** The mark that the arrow keys have reached. */
  private readonly reached = signal<string | null>(null);

  private readonly lane = computed(() => (this.marks().some((mark) => mark.percent === null) ? LANE : 0));
  private readonly scale = computed(() => ({
    centre: (this.lane() + this.width()) / 2,
    half: (this.width() - this.lane()) / 2 - 14,
  }));

  protected readonly swarm = computed<readonly Placed<StripMark>[]>(() => {
    const { centre, half } = this.scale();
    const measured = this.marks().filter((mark) => mark.percent !== null);
    const rest = this.marks().filter((mark) => mark.percent === null);
    return [
      ...beeswarm(rest, () => LANE / 2 - 8, GAP),
      ...beeswarm(measured, (mark) => centre + marginPlace(mark.percent ?? 0) * half, GAP),
    ];
  });

  private readonly reach = computed(() => Math.max(24, ...this.swarm().map((mark) => Math.abs(mark.y))));
  protected readonly middle = computed(() => this.reach() + 34);
  protected readonly height = computed(() => 2 * this.middle() + 16);
  protected readonly ticks = computed(() => {
    const { centre, half } = this.scale();
    const shown = this.width() < 520 ? TICKS.filter((tick) => Math.abs(tick) !== 3) : TICKS;
    return shown.map((tick) => ({
      x: centre + marginPlace(tick) * half,
      label: tick === 0 ? 'limit' : percentText(tick).replace('.0', ''),
      isLimit: tick === 0,
    }));
  });
  protected readonly laneEnd = computed(() => this.lane());

  protected readonly drawn = computed(() =>
    this.swarm().map((placed) => ({
      ...placed.item,
      tone: verdictTone(placed.item.verdict),
      at: `translate(${placed.x.toFixed(1)} ${(this.middle() + placed.y).toFixed(1)})`,
      spoken: `${placed.item.key} ${placed.item.title}: ${verdictWord(placed.item.verdict)}${placed.item.percent === null ? '' : `, margin ${percentText(placed.item.percent)}`}`,
    })),
  );
  protected readonly names = computed(() => {
    const failing = this.swarm().filter((placed) => placed.item.verdict === 'non-compliant');
    const worst = [...failing].sort((a, b) => (a.item.percent ?? 0) - (b.item.percent ?? 0)).slice(0, MOST_NAMES);
    return placeNames(worst, this.swarm(), this.width(), this.middle());
  });
  protected readonly tabStop = computed(() => this.reached() ?? this.drawn()[0]?.key);
  protected readonly kinds = computed(() => new Set(this.marks().map((mark) => mark.verdict)));

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      const element = this.host.nativeElement;
      const measure = (): void => this.width.set(Math.max(280, element.clientWidth));
      measure();
      const observer = new ResizeObserver(measure);
      observer.observe(element);
      destroyed.onDestroy(() => observer.disconnect());
    });
  }

  protected press(event: KeyboardEvent, index: number): void {
    const marks = this.drawn();
    const steps: Readonly<Record<string, number>> = {
      ArrowRight: index + 1,
      ArrowLeft: index - 1,
      Home: 0,
      End: marks.length - 1,
    };
    const next = marks[steps[event.key] ?? -1];
    if (event.key === 'Enter' || event.key === ' ') {
      const here = marks[index];
      if (here !== undefined) this.open.emit(here.key);
    } else if (next !== undefined) {
      this.reached.set(next.key);
      this.host.nativeElement.querySelector<SVGElement>(`[data-key="${CSS.escape(next.key)}"]`)?.focus();
    } else return;
    event.preventDefault();
  }
}
