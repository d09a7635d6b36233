import { ChangeDetectionStrategy, Component, type ElementRef, computed, input, output, signal, viewChild } from '@angular/core';
import { type Language } from '#compliance/outcome';

/** A place to drop files on, with a button for those who do not drag. What is not accepted is named, not dropped in silence. */
@Component({
  selector: 'kb-file-drop',
  templateUrl: './file-drop.html',
  styleUrl: './file-drop.scss',
  host: {
    '[class.over]': 'isOver()',
    '(dragenter)': 'enter($event)',
    '(dragover)': 'enter($event)',
    '(dragleave)': 'leave($event)',
    '(drop)': 'drop($event)',
  },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileDrop {
  private readonly picker = viewChild.required<ElementRef<HTMLInputElement>>('picker');

  readonly label = input('Drop files here');
  readonly buttonLabel = input('Choose files');
  /** As the HTML attribute: '.pdf,application/pdf'. Empty takes everything. */
  readonly accept = input('');
  readonly isMultiple = input(true);
  readonly isDisabled = input(false);
  readonly language = input<Language>('en');
  /** Never empty. */
  readonly files = output<readonly File[]>();

  protected readonly isOver = signal(false);
  protected readonly refused = signal<readonly string[]>([]);
  protected readonly refusedWords = computed(() => {
    const names = this.refused();
    if (names.length === 0) return '';
    const shown = names.slice(0, 3).join(', ');
    const more = names.length - 3;
    if (this.language() === 'es') return `No se aceptó: ${shown}${more > 0 ? ` y ${more} más` : ''}.`;
    return `Not taken: ${shown}${more > 0 ? ` and ${more} more` : ''}.`;
  });

  protected choose(): void {
    this.picker().nativeElement.click();
  }

  protected pick(): void {
    const picker = this.picker().nativeElement;
    this.take(Array.from(picker.files ?? []));
    // The same file may be chosen again after a failure.
    picker.value = '';
  }

  protected enter(event: DragEvent): void {
    if (this.isDisabled() || !event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    this.isOver.set(true);
  }

  protected leave(event: DragEvent): void {
    const to = event.relatedTarget;
    if (!(to instanceof Node) || !(event.currentTarget instanceof Node) || !event.currentTarget.contains(to)) this.isOver.set(false);
  }

  protected drop(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(false);
    if (!this.isDisabled()) this.take(Array.from(event.dataTransfer?.files ?? []));
  }

  private take(files: readonly File[]): void {
    const wanted = files.filter((file) => this.isAccepted(file));
    const taken = this.isMultiple() ? wanted : wanted.slice(0, 1);
    this.refused.set(files.filter((file) => !taken.includes(file)).map((file) => file.name));
    if (taken.length > 0) this.files.emit(taken);
  }

  private isAccepted(file: File): boolean {
    const accepted = this.accept()
      .split(',')
      .map((part) => part.trim().toLowerCase())
      .filter(Boolean);
    if (accepted.length === 0) return true;
    const name = file.name.toLowerCase();
    return accepted.some((part) => (part.startsWith('.') ? name.endsWith(part) : part.endsWith('/*') ? file.type.startsWith(part.slice(0, -1)) : file.type === part));
  }
}
