import { HttpClient, HttpErrorResponse } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type { ComplianceView } from '@shared/contract';
import { type Observable } from 'rxjs';
import { toProblem } from '../core/http/problem-error';
import { StudyContext } from '../core/study/study-context';

export type MatrixFormat = 'docx' | 'xlsx' | 'csv';

/** The matrix as a file, with the name that the server gave it. */
export interface MatrixFile {
  readonly name: string;
  readonly content: Blob;
}

/** The compliance matrix of the open study, to look at and as a file. */
@Injectable({ providedIn: 'root' })
export class ComplianceApi {
  private readonly http = inject(HttpClient);
  private readonly context = inject(StudyContext);

  matrix(): Observable<ComplianceView> {
    return this.http.get<ComplianceView>(this.context.api('compliance'), { params: this.context.readParams() });
  }

  /**
   * Writes the matrix at the present standpoint as a file. Not through HttpClient, which hands over a refusal as an
   * unread blob. Throws ProblemError; an abort passes through.
   */
  async file(format: MatrixFormat, signal: AbortSignal): Promise<MatrixFile> {
    const query = new URLSearchParams(this.context.readParams()).toString();
    const address = `${this.context.api('export', format)}${query === '' ? '' : `?${query}`}`;
    const response = await this.answer(address, signal);
    const name = /filename="([^"]+)"/.exec(response.headers.get('Content-Disposition') ?? '')?.[1];
    return { name: name ?? `compliance-matrix.${format}`, content: await response.blob() };
  }

  private async answer(address: string, signal: AbortSignal): Promise<Response> {
    let response: Response;
    try {
      response = await fetch(address, { signal, credentials: 'same-origin' });
    } catch (error) {
      if (signal.aborted) throw error;
      throw toProblem(new HttpErrorResponse({ status: 0 }));
    }
    if (response.ok) return response;
    const error: unknown = await response.json().catch(() => null);
    throw toProblem(new HttpErrorResponse({ status: response.status, error }));
  }
}
