import { TestBed } from '@angular/core/testing';
import { ThemeStore } from './theme-store';

/** jsdom has no media queries: this one stands for the system's choice. */
class SystemChoice extends EventTarget {
  matches = false;

  turn(dark: boolean): void {
    this.matches = dark;
    this.dispatchEvent(new Event('change'));
  }
}

describe('the theme', () => {
  let system: SystemChoice;
  const root = document.documentElement;

  beforeEach(() => {
    system = new SystemChoice();
    Object.assign(window, { matchMedia: () => system });
    localStorage.clear();
    delete root.dataset['theme'];
  });

  it('follows the system as it changes', () => {
    const theme = TestBed.inject(ThemeStore);
    expect(theme.dark()).toBe(false);
    system.turn(true);
    expect(theme.dark()).toBe(true);
  });

  it('is remembered once chosen, whatever the system says', () => {
    TestBed.inject(ThemeStore).choose('dark');
    TestBed.tick();
    expect(root.dataset['theme']).toBe('dark');
    TestBed.resetTestingModule();
    expect(TestBed.inject(ThemeStore).dark()).toBe(true);
  });

  it('goes back to the system when that is chosen', () => {
    const theme = TestBed.inject(ThemeStore);
    theme.choose('dark');
    theme.choose('system');
    TestBed.tick();
    expect(root.dataset['theme']).toBeUndefined();
    expect(localStorage).toHaveLength(0);
    expect(theme.dark()).toBe(false);
  });

  it('takes a stored word it does not know for no choice', () => {
    localStorage.setItem('tollgate.theme', 'sepia');
    expect(TestBed.inject(ThemeStore).choice()).toBe('system');
  });
});
