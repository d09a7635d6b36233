import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { type Problem } from '#shared/common';
import { Kit, KitEdit, type Product } from '#shared/products';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { Pictogram } from '#ui/pictogram';
import { problemOf } from '#ui/problem';
import { Access } from '../../contract/access';
import { Conflict } from '../../pieces/conflict';
import { ChoiceField, type Choice } from '../../pieces/fields/choice-field';
import { NumberField } from '../../pieces/fields/number-field';
import { QuantityField } from '../../pieces/fields/quantity-field';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { Unready } from '../../pieces/unready';
import { ProductsApi } from '../products-api';
import { ProductSearch } from './product-search';

type Form = KitEdit['parts'][number]['form'];
const forms: readonly Choice<Form>[] = [
  { value: 'liquid', label: 'liquid' },
  { value: 'powder', label: 'powder' },
  { value: 'paste', label: 'paste' },
];
const letters = 'ABCDEFGHIJKL';

/** One kit: its parts, how much one gives, how long it is mixed. New, changed, or only read, as the role allows. */
@Component({
  selector: 'kb-kit-page',
  imports: [ChoiceField, Conflict, FormTrouble, MatButton, Note, NumberField, PageHeader, Pictogram, ProductSearch, QuantityField, ReactiveFormsModule, RouterLink, TextField, Unready],
  templateUrl: './kit-page.html',
  styleUrl: './kit-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KitPage {
  private readonly api = inject(ProductsApi);
  private readonly access = inject(Access);
  private readonly router = inject(Router);
  private readonly builder = inject(NonNullableFormBuilder);

  readonly kitId = input<string>();

  protected readonly kit = signal<Kit | null>(null);
  protected readonly problem = signal<Problem | null>(null);
  private readonly version = signal(0);
  protected readonly isSaved = signal(false);
  protected readonly forms = forms;
  protected readonly mayEdit = computed(() => this.access.may(this.kitId() ? 'editKit' : 'addKit'));
  protected readonly form = this.builder.group({
    name: '',
    volumeL: this.builder.control<number | null>(null),
    mixMinutesPerKit: this.builder.control<number | null>(2),
    bucketMinutes: this.builder.control<number | null>(5),
    surfaceException: this.builder.group({ writtenBy: this.builder.control<string | null>(null), reference: this.builder.control<string | null>(null), text: this.builder.control<string | null>(null) }),
    cartridgeSchedule: this.builder.group({ change: this.builder.control<string | null>(null), basedOn: this.builder.control<string | null>(null) }),
    parts: this.builder.array<ReturnType<KitPage['partGroup']>>([]),
  });
  protected readonly sending = new FormSending(this.form);
  /** Name of each product on the page: the form itself holds ids only. */
  protected readonly names = signal<ReadonlyMap<string, string>>(new Map());
  protected readonly theirs = computed(() => {
    const current = Kit.safeParse(this.sending.problem()?.current);
    return current.success ? current.data : null;
  });
  protected readonly theirEdit = computed(() => {
    const theirs = this.theirs();
    return theirs ? editOf(theirs) : null;
  });
  protected readonly missing = computed(() => (this.kit()?.parts ?? []).filter(({ hasSheet }) => !hasSheet).map(({ productName }) => productName));

  constructor() {
    effect(() => {
      const id = this.kitId();
      untracked(() => id && void this.load(id));
    });
  }

  protected async load(id: string): Promise<void> {
    this.problem.set(null);
    try {
      this.take(await firstValueFrom(this.api.kit(id)));
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  protected addPart(product: Product): void {
    this.names.update((names) => new Map(names).set(product.id, product.name));
    const { length } = this.form.controls.parts;
    // A powder is most often named so; the person sees the choice and corrects it.
    this.form.controls.parts.push(this.partGroup({ productId: product.id, part: letters[length] ?? `${length + 1}`, form: /powder/i.test(product.name) ? 'powder' : 'liquid' }));
  }

  protected async save(): Promise<void> {
    const id = this.kitId();
    const saved = await this.sending.send(KitEdit, (edit) => firstValueFrom(id ? this.api.editKit(id, edit, this.version()) : this.api.addKit(edit)));
    if (!saved) return;
    if (!id) await this.router.navigate(['/products/kits', saved.id], { replaceUrl: true });
    this.take(saved);
    this.isSaved.set(true);
  }

  protected keepMine(theirs: Kit): void {
    this.version.set(theirs.version);
    void this.save();
  }

  protected takeTheirs(theirs: Kit): void {
    this.sending.problem.set(null);
    this.sending.refusal.set('');
    this.take(theirs);
  }

  private take(kit: Kit): void {
    this.kit.set(kit);
    this.version.set(kit.version);
    this.names.set(new Map(kit.parts.map(({ productId, productName }) => [productId, productName])));
    this.form.controls.parts.clear();
    for (const part of editOf(kit).parts) this.form.controls.parts.push(this.partGroup(part));
    this.form.reset(editOf(kit));
  }

  private partGroup({ productId, part, form }: KitEdit['parts'][number]) {
    return this.builder.group({ productId: this.builder.control(productId), part: this.builder.control(part), form: this.builder.control<Form>(form) });
  }
}

function editOf({ name, volumeL, mixMinutesPerKit, bucketMinutes, surfaceException, cartridgeSchedule, parts }: Kit) {
  return { name, volumeL, mixMinutesPerKit, bucketMinutes, surfaceException, cartridgeSchedule, parts: parts.map(({ productId, part, form }) => ({ productId, part, form })) };
}
