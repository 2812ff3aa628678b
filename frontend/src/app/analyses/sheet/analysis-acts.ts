import { Injectable, inject } from '@angular/core';
import { Router } from '@angular/router';
import type { AnalysisSheet, CommandOf } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../../core/errors/error-line';
import { toProblem } from '../../core/http/problem-error';
import { Edits } from '../../core/study/edits';
import { StudyContext } from '../../core/study/study-context';
import { Acts } from '../../core/acts/acts';
import { ProposeChange } from '../../core/acts/propose-change';
import { Ask } from '../../ui/ask/ask';

/** Steps on an analysis beside writing it: link, check, remove, propose, take a newer method. */
@Injectable({ providedIn: 'root' })
export class AnalysisActs {
  private readonly acts = inject(Acts);
  private readonly ask = inject(Ask);
  private readonly edits = inject(Edits);
  private readonly line = inject(ErrorLine);
  private readonly proposals = inject(ProposeChange);
  private readonly router = inject(Router);
  private readonly context = inject(StudyContext);

  /** Links an output to a requirement; a baselined one takes it through a change request. */
  async link(sheet: AnalysisSheet, offer: AnalysisSheet['couldVerify'][number]): Promise<void> {
    const command: CommandOf<'verification.link'> = {
      type: 'verification.link',
      requirementId: offer.id,
      method: 'analysis',
      level: '',
      stage: '',
      gate: '',
      criterion: '',
      analysisId: sheet.id,
      output: offer.output,
      deciding: false,
    };
    try {
      const answer = await firstValueFrom(this.edits.give([command]));
      this.acts.tell(answer, `${sheet.key} ${offer.output} verifies ${offer.key}`);
    } catch (error) {
      if (toProblem(error).code !== 'controlled') return this.line.report(error);
      await this.proposals.open({
        title: `Verify ${offer.key} by ${sheet.key}`,
        what: `${offer.key} ${offer.title} is baselined, its verifications included`,
        edits: [command],
      });
    }
  }

  /** Signs the check of an analysis that somebody else wrote. */
  async check(sheet: AnalysisSheet): Promise<void> {
    const answer = await this.ask.ask({
      title: `Sign the check of ${sheet.key}?`,
      text: 'Your name goes under its lines, inputs, method, results and assumptions as they stand; any later edit voids the signature.',
      action: 'Sign the check',
      reason: { label: 'Remark', hint: 'How it was checked', required: false },
    });
    if (answer === undefined) return;
    const { id, version } = sheet;
    await this.acts.give([{ type: 'analysis.check', id, version, remark: answer.reason }], `${sheet.key} is checked`);
  }

  /** Hands the author an address to give to somebody else, who then signs. */
  async askForCheck(sheet: AnalysisSheet): Promise<void> {
    const address = new URL(
      this.router.serializeUrl(this.router.createUrlTree(this.context.link('analyses', sheet.key))),
      document.baseURI,
    ).href;
    const people = (this.context.head.value()?.members ?? []).filter(({ id }) => id !== sheet.author.id);
    const names = people.slice(0, 4).map(({ name }) => name);
    const answer = await this.ask.ask({
      title: `Ask for a check of ${sheet.key}`,
      text: `Somebody who did not write it signs on this sheet${names.length === 0 ? '' : `, for instance ${names.join(', ')}`}. Give them its address: ${address}`,
      action: 'Copy the address',
    });
    if (answer === undefined) return;
    try {
      await navigator.clipboard.writeText(address);
      this.line.tell(`The address of ${sheet.key} is copied.`);
    } catch {
      this.line.tell(`This browser does not let the page copy. The address is ${address}`);
    }
  }

  async remove(sheet: AnalysisSheet): Promise<void> {
    const answer = await this.ask.ask({
      title: `Remove ${sheet.key}?`,
      text: `${sheet.name} leaves the study. What was recorded stays in the ledger.`,
      action: `Remove ${sheet.key}`,
    });
    if (answer === undefined) return;
    const { id, version } = sheet;
    const done = await this.acts.give([{ type: 'analysis.remove', id, version }], `${sheet.key} was removed`);
    if (done) await this.router.navigate(this.context.link('analyses'), { queryParams: this.context.readParams() });
  }

  /** Opens a draft in which a controlled analysis can be edited. */
  propose(sheet: AnalysisSheet): Promise<void> {
    return this.proposals.open({
      title: `Change ${sheet.key} ${sheet.name}`,
      what: `${sheet.key} verifies a requirement that`,
      edits: [],
      then: ['analyses', sheet.key],
    });
  }

  /** Pins a newer version of the method. */
  async renew(sheet: AnalysisSheet, version: string): Promise<void> {
    if (sheet.method === null) return;
    await this.acts.give(
      [
        {
          type: 'analysis.revise',
          id: sheet.id,
          version: sheet.version,
          changes: { method: { id: sheet.method.id, version } },
        },
      ],
      `${sheet.key} takes version ${version} of the method`,
    );
  }
}
