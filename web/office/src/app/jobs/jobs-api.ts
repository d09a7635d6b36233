import { httpResource } from '@angular/common/http';
import { inject, Injectable, type Signal } from '@angular/core';
import { type Observable } from 'rxjs';
import { type Job, type JobEdit, type JobSummary, type PublishedVersion, type Shift, type ShiftPlan, type SignBasis } from '#shared/jobs';
import { type Page } from '#shared/common';
import { ContractClient } from '../contract/contract-client';
import { answerOf, requestOf } from '../contract/contract-request';

export interface JobFilter {
  readonly q: string;
  readonly isOpen: '' | 'true' | 'false';
}

/** Jobs and their shifts. */
@Injectable({ providedIn: 'root' })
export class JobsApi {
  private readonly client = inject(ContractClient);

  list(filter: JobFilter, after?: string): Observable<Page<JobSummary>> {
    return this.client.call('listJobs', { query: { q: filter.q || undefined, isOpen: filter.isOpen || undefined, after } });
  }

  jobResource(jobId: Signal<string>) {
    return httpResource<Job>(() => requestOf('readJob', { params: { jobId: jobId() } }), { parse: answerOf('readJob') });
  }

  add(job: JobEdit): Observable<Job> {
    return this.client.call('addJob', { body: job });
  }

  edit(jobId: string, job: JobEdit, version: number): Observable<Job> {
    return this.client.call('editJob', { params: { jobId }, body: job, version });
  }

  addShift(jobId: string, date: string, copyFromShiftId: string | null): Observable<Shift> {
    return this.client.call('addShift', { params: { jobId }, body: { date, copyFromShiftId } });
  }

  shift(shiftId: string): Observable<Shift> {
    return this.client.call('readShift', { params: { shiftId } });
  }

  editPlan(shiftId: string, plan: ShiftPlan, version: number): Observable<Shift> {
    return this.client.call('editShiftPlan', { params: { shiftId }, body: plan, version });
  }

  signBasis(shiftId: string, basis: SignBasis): Observable<Shift> {
    return this.client.call('signBasis', { params: { shiftId }, body: basis });
  }

  publish(shiftId: string, version: number): Observable<PublishedVersion> {
    return this.client.call('publishShift', { params: { shiftId }, version });
  }

  /** The published bytes of a version in one language, untouched: they are hashed before they are shown. */
  text(versionId: string, language: string): Observable<ArrayBuffer> {
    return this.client.bytes('readText', { versionId, language });
  }
}
