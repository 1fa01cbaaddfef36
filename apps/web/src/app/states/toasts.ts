import { Injectable, signal } from '@angular/core';

export interface Toast {
  readonly id: number;
  readonly tone: 'done' | 'failure';
  readonly text: string;
}

const shownMs = 6000;

/** Short notes at the foot of the page, read out by screen readers. Failures stay until they are closed. */
@Injectable({ providedIn: 'root' })
export class Toasts {
  private readonly list = signal<readonly Toast[]>([]);
  private next = 1;

  readonly shown = this.list.asReadonly();

  done(text: string): void {
    const id = this.add('done', text);
    setTimeout(() => this.close(id), shownMs);
  }

  failure(text: string): void {
    if (!this.list().some((toast) => toast.text === text)) this.add('failure', text);
  }

  close(id: number): void {
    this.list.update((toasts) => toasts.filter((toast) => toast.id !== id));
  }

  private add(tone: Toast['tone'], text: string): number {
    const id = this.next++;
    this.list.update((toasts) => [...toasts.slice(-2), { id, tone, text }]);
    return id;
  }
}
