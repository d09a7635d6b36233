import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { ReactiveFormsModule, type FormGroup, type NonNullableFormBuilder } from '@angular/forms';
import { type SiteFacts } from '#shared/jobs';
import { ChoiceField, knownChoices } from '../../pieces/fields/choice-field';
import { NumberField } from '../../pieces/fields/number-field';
import { QuantityField } from '../../pieces/fields/quantity-field';
import { TextField } from '../../pieces/fields/text-field';
import { coveringChoices, settingChoices, surveyChoices } from './site-words';

/** A job before anybody said anything about its place: `null` and "unknown", never a guess. */
export const unknownSite: SiteFacts = {
  setting: 'indoors',
  roomVolumeM3: null,
  areaM2: null,
  thicknessMm: null,
  targetProfile: null,
  floor: { covering: 'unknown', builtYear: null, asbestos: 'unknown', lead: 'unknown', surveyReference: null },
  engines: { areUsedInside: null, isExhaustLedOutside: null, hasCarbonMonoxideAlarm: null },
  firstAid: { firstAiderName: null, hasEyewash: null, emergencyNumber: null, address: null },
  hostHazards: null,
  siteMaskRule: null,
};

export function siteForm(builder: NonNullableFormBuilder, site: SiteFacts) {
  const { floor, engines, firstAid } = site;
  return builder.group({
    setting: builder.control(site.setting),
    roomVolumeM3: builder.control(site.roomVolumeM3),
    areaM2: builder.control(site.areaM2),
    thicknessMm: builder.control(site.thicknessMm),
    targetProfile: builder.control(site.targetProfile),
    floor: builder.group({
      covering: builder.control(floor.covering),
      builtYear: builder.control(floor.builtYear),
      asbestos: builder.control(floor.asbestos),
      lead: builder.control(floor.lead),
      surveyReference: builder.control(floor.surveyReference),
    }),
    engines: builder.group({
      areUsedInside: builder.control(engines.areUsedInside),
      isExhaustLedOutside: builder.control(engines.isExhaustLedOutside),
      hasCarbonMonoxideAlarm: builder.control(engines.hasCarbonMonoxideAlarm),
    }),
    firstAid: builder.group({
      firstAiderName: builder.control(firstAid.firstAiderName),
      hasEyewash: builder.control(firstAid.hasEyewash),
      emergencyNumber: builder.control(firstAid.emergencyNumber),
      address: builder.control(firstAid.address),
    }),
    hostHazards: builder.control(site.hostHazards),
    siteMaskRule: builder.control(site.siteMaskRule ?? null),
  });
}

/** What is true of the place: room, floor, engines, first aid, the host's hazards. */
@Component({
  selector: 'kb-site-fields',
  imports: [ChoiceField, NumberField, QuantityField, ReactiveFormsModule, TextField],
  templateUrl: './site-fields.html',
  styleUrl: './site-fields.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SiteFields {
  readonly form = input.required<FormGroup>();

  protected readonly settingChoices = settingChoices;
  protected readonly coveringChoices = coveringChoices;
  protected readonly surveyChoices = surveyChoices;
  protected readonly knownChoices = knownChoices;
}
