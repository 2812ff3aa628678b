import type { MatrixHeader } from '@shared/contract';

/** Whether compliance is predicted or demonstrated; analysis in an early phase is never called verified. */
export function statement({ basis }: MatrixHeader): string {
  switch (basis) {
    case 'predicted':
      return 'Predicted compliance: every assessed row rests on analysis. Nothing here has been demonstrated.';
    case 'demonstrated':
      return 'Demonstrated compliance: every assessed row rests on recorded findings.';
    case 'predicted and demonstrated':
      return 'Predicted compliance, except the rows whose basis is demonstrated, which rest on recorded findings.';
  }
}

/** What stands beside the compliance counts: close-out, open items, departures. */
export function standings(header: MatrixHeader, total: number): string {
  return [
    `${header.closedRows} of ${total} rows closed`,
    `${header.openItems} to be resolved`,
    `${header.departuresInForce} ${header.departuresInForce === 1 ? 'departure' : 'departures'} in force`,
  ].join(' · ');
}
