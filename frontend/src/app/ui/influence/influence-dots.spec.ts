import { TestBed } from '@angular/core/testing';
import { InfluenceDots } from './influence-dots';

describe('InfluenceDots', () => {
  it('draws areas in proportion to influence and says the share', () => {
    const fixture = TestBed.createComponent(InfluenceDots);
    fixture.componentRef.setInput('requirements', [
      { key: 'VEH-002', title: 'Keep initial mass' },
      { key: 'VEH-003', title: 'Reach specific power' },
      { key: 'RAD-002', title: 'Reject heat' },
    ]);
    fixture.componentRef.setInput('inputs', [{ quantityKey: 'Q-001', name: 'Specific mass', influence: [1, 0.25, 0] }]);
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    const radii = [...host.querySelectorAll('circle')].map((circle) => Number(circle.getAttribute('r')));
    expect(radii).toHaveLength(2);
    // A quarter of the influence is a quarter of the area: half the radius.
    expect((radii[1] ?? 0) / (radii[0] ?? 1)).toBeCloseTo(0.5, 9);
    expect([...host.querySelectorAll('td .only-heard')].map((words) => words.textContent)).toEqual([
      '100 %',
      '25 %',
      'none',
    ]);
  });
});
