import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import type {
  Invitation,
  InvitationAcceptance,
  PeopleAnswer,
  PersonAnswer,
  PersonChange,
  Role,
} from '@shared/contract';
import { type Observable } from 'rxjs';

/** People, invitations and password resets on the server. */
@Injectable({ providedIn: 'root' })
export class PeopleApi {
  private readonly http = inject(HttpClient);

  /** Everybody with all their roles, and the studies in which roles can be granted. */
  people(): Observable<PeopleAnswer> {
    return this.http.get<PeopleAnswer>('/api/people');
  }

  invite(invitation: Invitation): Observable<PersonAnswer> {
    return this.http.post<PersonAnswer>('/api/people', invitation);
  }

  /** Sends a fresh link to somebody who has not accepted yet. */
  inviteAgain(id: string): Observable<unknown> {
    return this.http.post(`/api/people/${encodeURIComponent(id)}/invitation`, {});
  }

  change(id: string, change: PersonChange): Observable<PersonAnswer> {
    return this.http.patch<PersonAnswer>(`/api/people/${encodeURIComponent(id)}`, change);
  }

  /** Gives a person exactly these roles in a study; none takes them out of it. */
  setRoles(id: string, study: string, roles: readonly Role[]): Observable<unknown> {
    return this.http.put(`/api/studies/${encodeURIComponent(study)}/members/${encodeURIComponent(id)}`, { roles });
  }

  acceptInvitation(acceptance: InvitationAcceptance): Observable<unknown> {
    return this.http.post('/api/invitations/accept', acceptance);
  }

  /** Asks for a reset mail; the answer is the same whether or not the person exists. */
  requestPasswordReset(email: string): Observable<unknown> {
    return this.http.post('/api/session/password-reset', { email });
  }

  completePasswordReset(token: string, password: string): Observable<unknown> {
    return this.http.post('/api/password-resets/complete', { token, password });
  }
}
