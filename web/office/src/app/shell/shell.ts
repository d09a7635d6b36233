import { ChangeDetectionStrategy, Component, DOCUMENT, type ElementRef, computed, inject, signal, viewChild } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { filter } from 'rxjs';
import { roleNames } from '#shared/common';
import { BrandMark } from '#ui/brand-mark';
import { Note } from '#ui/note';
import { Access } from '../contract/access';
import { SessionApi } from '../session/session-api';
import { UploadStatus } from '../sheets/uploads/upload-status';
import { navigationFor } from './navigation';
import { NavigationCounts } from './navigation-counts';

/** The frame of every office page: skip link, navigation, who is signed in. On narrow screens the rail is a bar with a menu. */
@Component({
  selector: 'kb-shell',
  imports: [BrandMark, Note, RouterLink, RouterLinkActive, RouterOutlet, UploadStatus],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  host: { '(keydown.escape)': 'closeMenu()' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  private readonly document = inject(DOCUMENT);
  private readonly api = inject(SessionApi);
  private readonly access = inject(Access);
  private readonly router = inject(Router);
  private readonly navigationCounts = inject(NavigationCounts);
  private readonly page = viewChild.required<ElementRef<HTMLElement>>('page');
  private readonly menuButton = viewChild.required<ElementRef<HTMLElement>>('menuButton');

  protected readonly session = this.api.session;
  protected readonly counts = this.navigationCounts.counts;
  protected readonly isMenuOpen = signal(false);
  protected readonly signOutFailed = signal(false);
  protected readonly roleName = computed(() => {
    const session = this.session();
    return session ? roleNames[session.role] : '';
  });
  protected readonly entries = computed(() => {
    const session = this.session();
    return session ? navigationFor(session.role, this.router.config) : [];
  });

  protected readonly mayUpload = computed(() => this.access.may('uploadSheet'));

  private path = '';

  constructor() {
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        takeUntilDestroyed(),
      )
      .subscribe((event) => this.arrive(event.urlAfterRedirects));
  }

  protected focusPage(event: Event): void {
    event.preventDefault();
    this.page().nativeElement.focus();
  }

  protected toggleMenu(): void {
    this.isMenuOpen.update((isOpen) => !isOpen);
  }

  protected closeMenu(): void {
    if (!this.isMenuOpen()) return;
    this.isMenuOpen.set(false);
    this.menuButton().nativeElement.focus();
  }

  protected async signOut(): Promise<void> {
    try {
      await this.api.signOut();
      await this.router.navigateByUrl('/sign-in');
    } catch {
      this.signOutFailed.set(true);
    }
  }

  /** Puts the reader at a new page's beginning; who is still within the page (a row that opens beside its list) stays there. */
  private arrive(url: string): void {
    const path = url.split(/[?#]/)[0] ?? '';
    const isFirst = this.path === '';
    if (path === this.path) return;
    this.path = path;
    this.isMenuOpen.set(false);
    const page = this.page().nativeElement;
    if (!isFirst && !page.contains(this.document.activeElement)) page.focus();
    if (this.entries().some((entry) => entry.path === 'today')) void this.navigationCounts.refreshWhenOld();
  }
}
