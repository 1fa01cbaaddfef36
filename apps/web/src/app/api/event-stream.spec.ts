import { TestBed } from '@angular/core/testing';
import type { StreamEvent } from '@tollgate/contracts';
import { EventStream, pollEvent } from './event-stream';

/** The browser's EventSource, which jsdom lacks, driven by hand. */
class HandDriven {
  static readonly CLOSED = 2;
  static opened: HandDriven[] = [];
  readyState = 1;
  onmessage?: (message: { data: string }) => void;
  onerror?: () => void;

  constructor(readonly url: string) {
    HandDriven.opened.push(this);
  }

  close(): void {
    this.readyState = HandDriven.CLOSED;
  }

  send(event: Partial<StreamEvent>): void {
    this.onmessage?.({ data: JSON.stringify(event) });
  }
}

describe('the event stream', () => {
  let stream: EventStream;
  const last = () => HandDriven.opened.at(-1)!;

  beforeEach(() => {
    jest.useFakeTimers();
    HandDriven.opened = [];
    Object.assign(globalThis, { EventSource: HandDriven });
    stream = TestBed.inject(EventStream);
  });

  afterEach(() => {
    jest.useRealTimers();
    Reflect.deleteProperty(globalThis, 'EventSource');
  });

  it('is opened once for all who listen and closed with the last', () => {
    const one = stream.events.subscribe();
    const two = stream.events.subscribe();
    expect(HandDriven.opened).toHaveLength(1);
    one.unsubscribe();
    expect(last().readyState).toBe(1);
    two.unsubscribe();
    expect(last().readyState).toBe(HandDriven.CLOSED);
  });

  it('tells a listener only what is about its thing', () => {
    const seen: number[] = [];
    const listening = stream.about(() => ({ boardId: 'b1' })).subscribe((event) => seen.push(event.seq));
    last().send({ seq: 1, what: 'board.changed', boardId: 'b1' });
    last().send({ seq: 2, what: 'board.changed', boardId: 'b2' });
    expect(seen).toEqual([1]);
    listening.unsubscribe();
  });

  it('polls every ten seconds where there is no stream, and resumes after the last event seen', () => {
    const seen: string[] = [];
    const listening = stream.events.subscribe((event) => seen.push(event.what));
    last().send({ seq: 41, what: 'board.changed' });
    last().close();
    last().onerror?.();
    expect(seen).toEqual(['board.changed', pollEvent]);
    jest.advanceTimersByTime(10_000);
    expect(HandDriven.opened).toHaveLength(2);
    expect(last().url).toBe('/api/stream?since=41');
    listening.unsubscribe();
  });

  it('leaves a reconnection to the browser', () => {
    const seen: string[] = [];
    const listening = stream.events.subscribe((event) => seen.push(event.what));
    last().readyState = 0;
    last().onerror?.();
    expect(seen).toEqual([]);
    expect(HandDriven.opened).toHaveLength(1);
    listening.unsubscribe();
  });
});
