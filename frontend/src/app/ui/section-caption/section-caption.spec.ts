import { TestBed } from '@angular/core/testing';
import { SectionCaption } from './section-caption';

describe('SectionCaption', () => {
  it('is a heading that a region can be labelled by', () => {
    const fixture = TestBed.createComponent(SectionCaption);
    fixture.componentRef.setInput('text', 'What drives it');
    fixture.componentRef.setInput('anchor', 'drivers');
    fixture.detectChanges();
    const heading: HTMLElement | null = fixture.nativeElement.querySelector('h2#drivers');
    expect(heading?.textContent).toBe('What drives it');
  });
});
