import { ID, smallStudy, viewOf } from './small-study';

describe('the small study', () => {
  it('is proved as its description says', () => {
    const { proof } = viewOf(smallStudy());
    // 9.80665 m/s² × 6500 s × ln(120/65) = 39 081.0 m/s; U = 2 × 9.80665 × 50 s × ln(120/65) = 601.2 m/s
    const deltaV = proof.proven.get(ID.deltaV)!;
    expect(deltaV.value).toBeCloseTo(9.80665 * 6500 * Math.log(120 / 65), 6);
    expect(deltaV.expanded).toBeCloseTo(2 * 9.80665 * 50 * Math.log(120 / 65), 4);
    expect(deltaV.verdict).toBe('short margin');
    expect(proof.proven.get(ID.mass)!.verdict).toBe('non-compliant');
    expect(proof.proven.get(ID.outbound)!.verdict).toBe('no evidence');
  });
});
