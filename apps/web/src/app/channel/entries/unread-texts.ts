import { Injectable } from '@angular/core';

/** Text that could not be read as a value, kept for when its field shows again. One a screen. */
@Injectable()
export class UnreadTexts {
  private readonly texts = new Map<string, string>();

  get(key: string): string | undefined {
    return this.texts.get(key);
  }

  set(key: string, text: string | undefined): void {
    if (text === undefined) this.texts.delete(key);
    else this.texts.set(key, text);
  }
}
