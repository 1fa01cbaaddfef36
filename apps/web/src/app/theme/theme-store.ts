import { computed, inject, Injectable, DOCUMENT, effect, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { fromEvent, map, startWith } from 'rxjs';

export const themeChoices = ['system', 'light', 'dark'] as const;
export type ThemeChoice = (typeof themeChoices)[number];

/** Read by public/theme.js too, before the first paint. */
const storageKey = 'tollgate.theme';

/** Colours for what CSS cannot reach (canvas), as they are in the theme that shows. */
const colourNames = [
  'ground',
  'surface',
  'hover',
  'chosen',
  'ink',
  'slate',
  'rule',
  'outline',
  'copper',
  'verdigris',
  'oxide',
  'ochre',
] as const;
export type Palette = Readonly<Record<(typeof colourNames)[number], string>>;

/** Vellum, ink, or as the system has it; remembered in this browser. */
@Injectable({ providedIn: 'root' })
export class ThemeStore {
  private readonly document = inject(DOCUMENT);
  private readonly view = this.document.defaultView!;
  private readonly storage = storageOf(this.view);
  private readonly darkSystem = this.view.matchMedia('(prefers-color-scheme: dark)');
  private readonly systemIsDark = toSignal(
    fromEvent(this.darkSystem, 'change').pipe(
      startWith(undefined),
      map(() => this.darkSystem.matches),
    ),
    { requireSync: true },
  );

  readonly choice = signal<ThemeChoice>(this.remembered());
  readonly dark = computed(() =>
    this.choice() === 'system' ? this.systemIsDark() : this.choice() === 'dark',
  );
  /** Resolved colours of the theme that shows; changes when it does. */
  readonly palette = computed<Palette>(() => {
    this.apply(this.choice());
    this.dark();
    const style = this.view.getComputedStyle(this.document.documentElement);
    const entries = colourNames.map((name) => [name, style.getPropertyValue(`--tg-${name}`).trim()]);
    return Object.fromEntries(entries) as Palette;
  });

  constructor() {
    effect(() => this.apply(this.choice()));
  }

  choose(choice: ThemeChoice): void {
    this.choice.set(choice);
    if (choice === 'system') this.storage?.removeItem(storageKey);
    else this.storage?.setItem(storageKey, choice);
  }

  private apply(choice: ThemeChoice): void {
    const root = this.document.documentElement;
    if (choice === 'system') delete root.dataset['theme'];
    else root.dataset['theme'] = choice;
  }

  private remembered(): ThemeChoice {
    const stored = this.storage?.getItem(storageKey);
    return themeChoices.find((choice) => choice === stored) ?? 'system';
  }
}

/** The browser's storage; undefined where the person has blocked it: the choice then lasts as long as the page. */
function storageOf(view: Window): Storage | undefined {
  try {
    return view.localStorage;
  } catch (error) {
    if (error instanceof DOMException) return undefined;
    throw error;
  }
}
