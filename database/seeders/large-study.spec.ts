import { canonicalJson, proveAll } from '@shared/study';
import { largeStudy } from './large-study';

const SIZE = { requirements: 500, quantities: 60, analyses: 200 };

it('is the same on every call', () => {
  expect(canonicalJson(largeStudy(SIZE).patch())).toBe(canonicalJson(largeStudy(SIZE).patch()));
});

it('has the size asked for and proves every requirement', () => {
  const study = largeStudy(SIZE);
  expect(study.all('requirement')).toHaveLength(500);
  expect(study.all('trace')).toHaveLength(499);
  expect(study.all('quantity')).toHaveLength(60);
  expect(study.all('analysis')).toHaveLength(200);
  const verdicts = new Set([...proveAll(study).proven.values()].map(({ verdict }) => verdict));
  expect(verdicts).toEqual(new Set(['compliant', 'non-compliant', 'indeterminate']));
});
