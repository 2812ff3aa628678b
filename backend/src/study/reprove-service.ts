import { canonicalJson, proveAll, type Proven } from '@shared/study';
import { Transaction, type Sequelize } from 'sequelize';
import { Study as StudyRow } from '../models/study';
import { derivedOutcomes, readDerived } from './derived-rows';
import { readStudy } from './entity-rows';
import { checkChain, type ChainCheck } from './ledger';

/** What a full re-proof of one study found. Empty lists say that everything stored follows from what was entered. */
export interface ReproofReport {
  readonly key: string;
  readonly revision: number;
  readonly requirements: number;
  readonly results: number;
  /** Requirements whose stored verdict is not what the inputs give, with both. */
  readonly verdicts: readonly { readonly key: string; readonly stored: string; readonly proved: string }[];
  /** Outputs whose stored value is not what the inputs give. */
  readonly outputs: readonly { readonly node: string; readonly stored: string; readonly proved: string }[];
  readonly chain: ChainCheck;
}

/** Proves one study from scratch out of its rows alone and compares with every stored verdict and result, bit by bit. */
export async function reproveStudy(sequelize: Sequelize, studyId: string): Promise<ReproofReport> {
  return sequelize.transaction(
    { isolationLevel: Transaction.ISOLATION_LEVELS.REPEATABLE_READ },
    async (transaction) => {
      const row = await StudyRow.findByPk(studyId, { transaction });
      const study = await readStudy(studyId, transaction);
      if (!row || !study) throw new Error('there is no such study');
      const proof = proveAll(study);
      const stored = await readDerived(sequelize, studyId, transaction);
      const verdicts: { key: string; stored: string; proved: string }[] = [];
      for (const id of new Set([...proof.proven.keys(), ...stored.verdicts.keys()])) {
        const was = stored.verdicts.get(id);
        const is = proof.proven.get(id);
        if (was && is && canonicalJson(was) === canonicalJson(is)) continue;
        verdicts.push({ key: study.get('requirement', id)?.key ?? id, stored: inWords(was), proved: inWords(is) });
      }
      const outputs: { node: string; stored: string; proved: string }[] = [];
      const outcomes = derivedOutcomes(proof);
      for (const node of new Set([...outcomes.keys(), ...stored.results.keys()])) {
        const was = stored.results.get(node);
        const is = outcomes.get(node);
        if (was && is && canonicalJson(was) === canonicalJson(is)) continue;
        outputs.push({ node, stored: canonicalJson(was ?? null), proved: canonicalJson(is ?? null) });
      }
      return {
        key: row.key,
        revision: Number(row.revision),
        requirements: proof.proven.size,
        results: outcomes.size,
        verdicts,
        outputs,
        chain: await checkChain(sequelize, studyId),
      };
    },
  );
}

function inWords(proven: Proven | undefined): string {
  if (!proven) return 'nothing';
  return proven.value === null ? proven.verdict : `${proven.verdict} at ${proven.value}`;
}

/** Whether a report says that everything stored follows from what was entered. */
export function holds(report: ReproofReport): boolean {
  return report.verdicts.length === 0 && report.outputs.length === 0 && report.chain.broken === null;
}
