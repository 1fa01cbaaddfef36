import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { QuantityEntry } from './quantity-entry';
import { readEntry } from './read-entry';
import { UnreadTexts } from './unread-texts';

const length = { dimension: 'length', label: 'Length', unit: 'mm', min: 0, max: 1000 } as const;

function open(value: number | undefined) {
  TestBed.configureTestingModule({ providers: [UnreadTexts] });
  const fixture = TestBed.createComponent(QuantityEntry);
  const emitted: (number | undefined)[] = [];
  fixture.componentRef.setInput('field', length);
  fixture.componentRef.setInput('value', value);
  fixture.componentRef.setInput('path', 'lengthM');
  fixture.componentRef.setInput('scope', 'L1');
  fixture.componentInstance.valueChange.subscribe((next) => {
    emitted.push(next);
    fixture.componentRef.setInput('value', next);
  });
  fixture.detectChanges();
  return { fixture, emitted, field: fieldOf(fixture), error: () => errorOf(fixture) };
}

function fieldOf(fixture: ComponentFixture<QuantityEntry>): HTMLInputElement {
  return (fixture.nativeElement as HTMLElement).querySelector('input')!;
}

function errorOf(fixture: ComponentFixture<QuantityEntry>): string {
  fixture.detectChanges();
  return (fixture.nativeElement as HTMLElement).querySelector('.error')!.textContent.trim();
}

function type(field: HTMLInputElement, text: string): void {
  field.value = text;
  field.dispatchEvent(new Event('input'));
}

describe('a quantity in a field', () => {
  it('takes text with a unit and gives SI', () => {
    const { field, emitted, error } = open(0.02);
    expect(field.value).toBe('20 mm');
    type(field, '12 mil');
    expect(emitted).toEqual([304.8e-6]);
    expect(error()).toBe('');
  });

  it('stays in the unit that was typed', () => {
    const { fixture, field, emitted } = open(0.02);
    type(field, '12 mil');
    field.dispatchEvent(new Event('blur'));
    fixture.detectChanges();
    expect(field.value).toBe('12 mil');
    type(field, '14');
    expect(emitted.at(-1)).toBeCloseTo(14 * 25.4e-6, 12);
  });

  it('keeps what it cannot read in place, says why, and changes nothing', () => {
    const { field, emitted, error } = open(0.02);
    type(field, '12 furlong');
    field.dispatchEvent(new Event('blur'));
    expect(error()).toContain('is not a unit of length');
    expect(field.value).toBe('12 furlong');
    expect(field.getAttribute('aria-invalid')).toBe('true');
    expect(emitted).toEqual([]);
  });

  it('brings the unread text back when its element shows again', () => {
    const { fixture, field } = open(0.02);
    type(field, '12 furlong');
    fixture.componentRef.setInput('scope', 'L2');
    fixture.componentRef.setInput('value', 0.03);
    fixture.detectChanges();
    expect(field.value).toBe('30 mm');
    fixture.componentRef.setInput('scope', 'L1');
    fixture.componentRef.setInput('value', 0.02);
    fixture.detectChanges();
    expect(field.value).toBe('12 furlong');
  });

  it('shows the value again when it changes from elsewhere', () => {
    const { fixture, field } = open(0.02);
    type(field, '12 furlong');
    fixture.componentRef.setInput('value', 0.04);
    fixture.detectChanges();
    expect(field.value).toBe('40 mm');
  });

  it('refuses an empty field unless it may be left out', () => {
    expect(readEntry('', length, true, 'mm')).toEqual({ ok: true, value: undefined });
    expect(readEntry('', length, false, 'mm').ok).toBe(false);
  });

  it('says a bound in units', () => {
    const read = readEntry('-1 mm', length, false, 'mm');
    expect(read.ok ? '' : read.message).toBe('Length must be at least 0 mm.');
  });
});
