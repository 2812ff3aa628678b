import { TestBed } from '@angular/core/testing';
import { RoleMatrix } from './role-matrix';

describe('RoleMatrix', () => {
  it('ticks and unticks one role in one study and keeps the others', () => {
    const fixture = TestBed.createComponent(RoleMatrix);
    fixture.componentRef.setInput('studies', [
      { key: 'PETREL', name: 'Petrel' },
      { key: 'CINDER', name: 'Cinder' },
    ]);
    fixture.componentRef.setInput('value', { PETREL: ['analyst'] });
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    const box = (label: string) => host.querySelector<HTMLInputElement>(`input[aria-label="${label}"]`);
    expect(box('Analyst in Petrel')?.checked).toBe(true);
    box('Requirements owner in Petrel')?.click();
    box('Reader in Cinder')?.click();
    expect(fixture.componentInstance.value()).toEqual({
      PETREL: ['requirements-owner', 'analyst'],
      CINDER: ['reader'],
    });
    box('Analyst in Petrel')?.click();
    expect(fixture.componentInstance.value()['PETREL']).toEqual(['requirements-owner']);
  });
});
