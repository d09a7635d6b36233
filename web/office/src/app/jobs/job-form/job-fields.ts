import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { ReactiveFormsModule, type FormGroup } from '@angular/forms';
import { CheckField } from '../../pieces/fields/check-field';
import { ChoiceField } from '../../pieces/fields/choice-field';
import { TextField } from '../../pieces/fields/text-field';
import { SiteFields } from './site-fields';
import { jurisdictionChoices, timeZoneChoices } from './site-words';

/** Everything a job is: name, site, law, and what is true of the place. */
@Component({
  selector: 'kb-job-fields',
  imports: [CheckField, ChoiceField, ReactiveFormsModule, SiteFields, TextField],
  template: `
    <ng-container [formGroup]="form()">
      <div class="grid">
        <kb-text-field class="wide" label="Job name" formControlName="name" hint="what the crew calls it, for example the room" />
        <kb-text-field class="wide" label="Site" formControlName="siteName" hint="name, town, state" />
        <kb-text-field label="Who controls the site" formControlName="siteController" [isNullable]="true" />
        <kb-choice-field label="Which law" formControlName="jurisdictionId" [choices]="jurisdictionChoices" />
        <kb-choice-field label="Time zone" formControlName="timeZone" [choices]="zones()" />
        @if (showOpen()) {
          <kb-check-field label="This job is open" formControlName="isOpen" />
        }
      </div>
      <kb-site-fields [form]="$any(form().controls['site'])" />
    </ng-container>
  `,
  styleUrl: './site-fields.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobFields {
  readonly form = input.required<FormGroup>();
  readonly showOpen = input(false);

  protected readonly jurisdictionChoices = jurisdictionChoices;
  protected readonly zones = computed(() => timeZoneChoices(String(this.form().get('timeZone')?.value ?? 'America/Chicago')));
}
