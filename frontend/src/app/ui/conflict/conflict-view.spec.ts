import { TestBed } from '@angular/core/testing';
import { ConflictView } from './conflict-view';

describe('ConflictView', () => {
  it('shows only what differs, proposes mine and gives back the side chosen for each field', () => {
    const fixture = TestBed.createComponent(ConflictView);
    fixture.componentRef.setInput('what', 'Quantity Q-012');
    fixture.componentRef.setInput('fields', [
      { field: 'value', label: 'Value', theirs: '812 K', mine: '760 K' },
      { field: 'source', label: 'Source', theirs: 'test report', mine: 'estimate' },
      { field: 'name', label: 'Name', theirs: 'Temperature', mine: 'Temperature' },
    ]);
    const resolved: unknown[] = [];
    fixture.componentInstance.resolve.subscribe((sides) => resolved.push(sides));
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    expect([...host.querySelectorAll('tbody th')].map((cell) => cell.textContent)).toEqual(['Value', 'Source']);
    host.querySelector<HTMLInputElement>('tbody tr:first-child input')?.click();
    host.querySelector('button')?.click();
    expect(resolved).toEqual([{ value: 'theirs', source: 'mine' }]);
  });
});
