import { type NonNullableFormBuilder } from '@angular/forms';
import { type JobEdit } from '#shared/jobs';
import { siteForm, unknownSite } from './site-fields';

/** The browser's own zone; a machine set to UTC stands in no place, so one of the United States is proposed. */
const own = Intl.DateTimeFormat().resolvedOptions().timeZone;

export const emptyJob: JobEdit = {
  name: '',
  siteName: '',
  siteController: null,
  jurisdictionId: 'us-federal',
  timeZone: own === 'UTC' ? 'America/Chicago' : own,
  isOpen: true,
  site: unknownSite,
};

export function jobForm(builder: NonNullableFormBuilder, job: JobEdit) {
  return builder.group({
    name: builder.control(job.name),
    siteName: builder.control(job.siteName),
    siteController: builder.control(job.siteController),
    jurisdictionId: builder.control(job.jurisdictionId),
    timeZone: builder.control(job.timeZone),
    isOpen: builder.control(job.isOpen),
    site: siteForm(builder, job.site),
  });
}

/** Only what the contract lets a person edit, from a job as it was read. */
export function editOf(job: JobEdit): JobEdit {
  const { name, siteName, siteController, jurisdictionId, timeZone, isOpen, site } = job;
  return { name, siteName, siteController, jurisdictionId, timeZone, isOpen, site };
}
