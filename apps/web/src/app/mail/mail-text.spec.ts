import { TestBed } from '@angular/core/testing';
import { MailText } from './mail-text';

async function show(text: string): Promise<HTMLElement> {
  const fixture = TestBed.createComponent(MailText);
  fixture.componentRef.setInput('text', text);
  await fixture.whenStable();
  return fixture.nativeElement as HTMLElement;
}

describe('the text of a mail', () => {
  it('is shown as written, line by line', async () => {
    expect((await show('Hello,\n\nopen this.')).textContent).toBe('Hello,\n\nopen this.');
  });

  it('makes its addresses links', async () => {
    const host = await show('Open http://127.0.0.1:4300/reset/abc now.');
    expect(host.querySelector('a')?.href).toBe('http://127.0.0.1:4300/reset/abc');
    expect(host.textContent).toBe('Open http://127.0.0.1:4300/reset/abc now.');
  });

  it('shows markup as text', async () => {
    const host = await show('<img src=x onerror=alert(1)> javascript:alert(1)');
    expect(host.querySelector('img, a')).toBeNull();
  });
});
