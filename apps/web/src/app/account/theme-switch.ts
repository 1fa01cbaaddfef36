import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { ThemeStore, themeChoices, type ThemeChoice } from '../theme/theme-store';

const titles: Readonly<Record<ThemeChoice, string>> = {
  system: 'As the system has it',
  light: 'Light, on vellum',
  dark: 'Dark, on ink',
};

/** Light, dark, or as the system has it; holds at once and is remembered in this browser. */
@Component({
  selector: 'tg-theme-switch',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './theme-switch.html',
  styleUrl: './theme-switch.scss',
})
export class ThemeSwitch {
  protected readonly theme = inject(ThemeStore);
  protected readonly choices = themeChoices;
  protected readonly titles = titles;
}
