import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Person } from '#shared/people';
import { dayOf } from '../../pieces/dates';
import { fitTestChoices, respiratorChoices } from '../person-form';

/** What is on file about a person. */
@Component({
  selector: 'kb-person-facts',
  template: `
    @let facts = person();
    <dl class="kb-pairs">
      <dt>Reads</dt>
      <dd>{{ facts.language === 'es' ? 'Español' : 'English' }}</dd>
      <dt>Employer</dt>
      <dd>{{ facts.employer ?? 'ours' }}</dd>
      <dt>Silica training</dt>
      <dd>{{ facts.silicaTrainedOn ? dayOf(facts.silicaTrainedOn) : 'not on file' }}{{ facts.silicaTrainedBy ? ', certified by ' + facts.silicaTrainedBy : '' }}</dd>
      <dt>Hazard training</dt>
      <dd>{{ facts.hazcomTrainedOn ? dayOf(facts.hazcomTrainedOn) : 'not on file' }}{{ facts.hazcomTrainedBy ? ', certified by ' + facts.hazcomTrainedBy : '' }}</dd>
      <dt>Over 18</dt>
      <dd>{{ facts.isAdultConfirmed ? 'confirmed' : 'not confirmed' }}</dd>
      @if (facts.isKeptFromIsocyanates) {
        <dt>Limit</dt>
        <dd>kept from isocyanates</dd>
      }
      <dt>Respirators</dt>
      <dd>
        @for (line of respirators(); track line) {
          <div>{{ line }}</div>
        } @empty {
          none on file
        }
      </dd>
    </dl>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonFacts {
  readonly person = input.required<Person>();

  protected readonly dayOf = dayOf;
  protected readonly respirators = computed(() =>
    this.person().respirators.map(({ type, label, clearedOn, fitTestedOn, fitTestKind }) => {
      const name = respiratorChoices.find(({ value }) => value === type)?.label ?? type;
      return `${name}, ${label}: cleared ${clearedOn ? dayOf(clearedOn) : 'not on file'}, fit tested ${fitTestedOn ? dayOf(fitTestedOn) : 'not on file'}${fitTestedOn && fitTestKind ? ` (${fitTestChoices.find(({ value }) => value === fitTestKind)?.label ?? fitTestKind})` : ''}`;
    }),
  );
}
