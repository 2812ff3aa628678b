import { mayGive, ROLE_NAMES, COMMAND_ROLES } from '@shared/contract';
import type { Command, CommandType } from '@shared/contract';
import type { Apply, EditContext } from '../edit-context';
import { refuseDangling } from '../integrity';
import { Refusal } from '../refusal';
import type { Study } from '../study';
import { checkAnalysisBySignature, createAnalysis, removeAnalysis, reviseAnalysis } from './analyses';
import { assessmentCommands, type RowFacts } from './assessments';
import { takeBaseline } from './baselines';
import { assessChange, changeCommands, referChange, reviseChange, voteOnChange, withdrawChange } from './changes';
import { decideDeparture, expireDeparture, requestDeparture } from './departures';
import { createQuantity, removeQuantity, reviseQuantity, setQuantity } from './quantities';
import * as requirements from './requirements';
import * as structure from './structure';
import { undoEdit } from './undo';
import { linkVerification, recordFinding, reviseVerification, unlinkVerification } from './verifications';

export type { RowFacts } from './assessments';

type Table = { readonly [T in CommandType]: Apply<T> };

/**
 * Applies commands to a fork of the study, in order; the first refusal refuses all of them. Pure: identifiers, time,
 * actor and derived facts come in with the context. Throws Refusal with the position of the command.
 */
export function applyCommands(
  study: Study,
  commands: readonly Command[],
  context: EditContext,
  facts: (requirementId: string) => RowFacts,
): void {
  const changes = changeCommands((fork, edits, inner) => applyAll(fork, edits, inner));
  const assessments = assessmentCommands(facts);
  const table: Table = {
    'study.configure': structure.configureStudy,
    'policy.create': structure.createPolicy,
    'policy.revise': structure.revisePolicy,
    'policy.remove': structure.removePolicy,
    'element.create': structure.createElement,
    'element.revise': structure.reviseElement,
    'element.remove': structure.removeElement,
    'requirement.create': requirements.createRequirement,
    'requirement.revise': requirements.reviseRequirement,
    'requirement.withdraw': requirements.withdrawRequirement,
    'requirement.submit': requirements.submitRequirement,
    'requirement.return': requirements.returnRequirement,
    'trace.link': requirements.linkTrace,
    'trace.unlink': requirements.unlinkTrace,
    'budget.set': requirements.setBudget,
    'budget.propose': requirements.proposeShare,
    'budget.adopt': requirements.adoptShare,
    'quantity.create': createQuantity,
    'quantity.set': setQuantity,
    'quantity.revise': reviseQuantity,
    'quantity.remove': removeQuantity,
    'analysis.create': createAnalysis,
    'analysis.revise': reviseAnalysis,
    'analysis.remove': removeAnalysis,
    'analysis.check': checkAnalysisBySignature,
    'verification.link': linkVerification,
    'verification.revise': reviseVerification,
    'verification.unlink': unlinkVerification,
    'verification.record': recordFinding,
    'assessment.lower': assessments.lower,
    'assessment.close': assessments.close,
    'assessment.reopen': assessments.reopen,
    'departure.request': requestDeparture,
    'departure.decide': decideDeparture,
    'departure.expire': expireDeparture,
    'change.write': changes.write,
    'change.revise': reviseChange,
    'change.amend': changes.amend,
    'change.drop': changes.drop,
    'change.rebase': changes.rebase,
    'change.submit': changes.submit,
    'change.assess': assessChange,
    'change.refer': referChange,
    'change.vote': voteOnChange,
    'change.dispose': changes.dispose,
    'change.withdraw': withdrawChange,
    'baseline.take': takeBaseline,
    'edit.undo': undoEdit,
  };

  function applyAll(fork: Study, list: readonly Command[], inner: EditContext): void {
    list.forEach((command, index) => {
      try {
        if (inner.authority === 'direct') refuseRole(command, inner);
        (table[command.type] as Apply<CommandType>)(fork, command, inner);
      } catch (error) {
        if (error instanceof Refusal) error.command = index;
        throw error;
      }
    });
  }

  applyAll(study, commands, context);
  refuseDangling(study, study.patch());
}

function refuseRole(command: Command, context: EditContext): void {
  if (mayGive(command.type, context.roles)) return;
  const needed = COMMAND_ROLES[command.type].map((role) => ROLE_NAMES[role].toLowerCase()).join(' or ');
  const held = context.roles.map((role) => ROLE_NAMES[role].toLowerCase()).join(', ') || 'none';
  throw new Refusal('forbidden', `This needs the role of ${needed} in this study; your role here is ${held}.`, {
    field: 'type',
    value: command.type,
    expected: `the role of ${needed}`,
  });
}
