import { TestBed } from '@angular/core/testing';
import { Ask } from './ask';
import { type Question } from './ask-dialog';

const QUESTION: Question = {
  title: 'Approve CR-024?',
  text: 'VEH-001 would become indeterminate.',
  action: 'Approve',
  reason: { label: 'Reason', required: true },
};

describe('Ask', () => {
  const button = (text: string): HTMLButtonElement | undefined =>
    [...document.querySelectorAll('button')].find((candidate) => candidate.textContent?.trim() === text);
  const settle = async (): Promise<void> => {
    TestBed.tick();
    await new Promise((resolve) => setTimeout(resolve));
  };

  it('does not let a required reason be left out, and gives it back trimmed', async () => {
    const answer = TestBed.inject(Ask).ask(QUESTION);
    await settle();
    button('Approve')?.click();
    await settle();
    expect(document.querySelector('[role="alert"]')?.textContent).toContain('A reason is needed');
    const box = document.querySelector('textarea');
    if (box === null) throw new Error('no textarea');
    box.value = '  agreed by the board ';
    box.dispatchEvent(new Event('input'));
    await settle();
    button('Approve')?.click();
    await settle();
    expect(await answer).toEqual({ reason: 'agreed by the board' });
  });

  it('answers nothing when the person leaves it', async () => {
    const answer = TestBed.inject(Ask).ask(QUESTION);
    await settle();
    button('Leave it')?.click();
    await settle();
    expect(await answer).toBeUndefined();
  });
});
