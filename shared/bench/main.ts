import { layeredGroup } from './groups/layered';
import { shapesGroup } from './groups/shapes';
import type { Line } from './measure';

const GROUPS: readonly (() => Promise<Line[]>)[] = [layeredGroup, shapesGroup];

function figure(x: number): string {
  return x < 0.1 ? `${(x * 1000).toPrecision(3)}e-3` : x.toPrecision(3);
}

function table(lines: readonly Line[]): string {
  const header = ['what', 'ours (ms)', 'peer (ms)', 'peer', 'peer / ours', 'target', ''];
  const rows = lines.map((line) => [
    line.name,
    figure(line.ours),
    figure(line.peer),
    line.peerName,
    line.ratio >= 10 ? line.ratio.toFixed(0) : line.ratio.toFixed(2),
    line.target,
    line.met ? 'met' : 'NOT MET',
  ]);
  const widths = header.map((title, i) => Math.max(title.length, ...rows.map((row) => row[i]?.length ?? 0)));
  return [header, ...rows]
    .map((row) =>
      row
        .map((cell, i) => cell.padEnd(widths[i] ?? 0))
        .join('  ')
        .trimEnd(),
    )
    .join('\n');
}

const json = process.argv.includes('--json');
const lines: Line[] = [];
for (const group of GROUPS) {
  if (!json) process.stderr.write(`measuring ${group.name} …\n`);
  lines.push(...(await group()));
}
process.stdout.write(`${json ? JSON.stringify(lines, null, 2) : table(lines)}\n`);
