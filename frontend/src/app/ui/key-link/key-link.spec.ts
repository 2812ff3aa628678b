import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { KeyLink } from './key-link';

describe('KeyLink', () => {
  it('leads to the sheet as seen from the same standpoint and leaves filters behind', async () => {
    TestBed.configureTestingModule({ providers: [provideRouter([{ path: '**', children: [] }])] });
    await TestBed.inject(Router).navigateByUrl('/studies/PETREL/compliance?at=baseline:B2&verdict=non-compliant');
    const fixture = TestBed.createComponent(KeyLink);
    fixture.componentRef.setInput('key', 'VEH-002');
    fixture.componentRef.setInput('to', ['/studies', 'PETREL', 'requirements', 'VEH-002']);
    fixture.componentRef.setInput('title', 'Keep initial mass');
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    expect(host.querySelector('a')?.getAttribute('href')).toBe('/studies/PETREL/requirements/VEH-002?at=baseline:B2');
    expect(host.textContent).toMatch(/VEH-002\s*Keep initial mass/);
  });
});
