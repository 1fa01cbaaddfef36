import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { channelVerdicts, type ChannelVerdict } from '@tollgate/contracts';
import { Verdict } from './verdict';
import { VerdictHarness } from './verdict.harness';

async function show(verdict: ChannelVerdict, status?: string, detail = ''): Promise<VerdictHarness> {
  const fixture = TestBed.createComponent(Verdict);
  fixture.componentRef.setInput('verdict', verdict);
  fixture.componentRef.setInput('status', status);
  fixture.componentRef.setInput('detail', detail);
  return TestbedHarnessEnvironment.harnessForFixture(fixture, VerdictHarness);
}

describe('a verdict', () => {
  it('has a mark of its own shape for each kind, so that it does not rest on colour', async () => {
    const looks = new Set<string>();
    for (const verdict of channelVerdicts) {
      const harness = await show(verdict);
      looks.add(JSON.stringify([await harness.shapes(), await harness.isDashed()]));
    }
    expect(looks.size).toBe(channelVerdicts.length);
  });

  it('dashes the ring of what is not checked', async () => {
    expect(await (await show('not-checked')).isDashed()).toBe(true);
    expect(await (await show('holds')).isDashed()).toBe(false);
  });

  it('carries the status of the limit in its word', async () => {
    expect(await (await show('holds', 'informative')).words()).toBe('Holds, informative limit');
  });

  it('does not qualify a normative limit', async () => {
    expect(await (await show('exceeds', 'normative')).words()).toBe('Exceeds');
  });

  it('names no status where nothing was judged', async () => {
    expect(await (await show('not-judged', 'informative')).words()).toBe('Not judged');
  });

  it('adds its detail after the word', async () => {
    expect(await (await show('holds', undefined, '1.84 dB left at 12.9 GHz')).words()).toBe(
      'Holds, 1.84 dB left at 12.9 GHz',
    );
  });
});
