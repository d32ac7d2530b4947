// What the channel browser lists, draws and does to a plan, whatever the cell.
import { describe, expect, it } from 'vitest';
import { listedChannels } from '../../src-main/engine/listed-channels.ts';
import { followsAtOnce, gatesWords, steadySeries, timeSeries } from '../../src-renderer/cell/channel-curves.ts';
import { channelGroups } from '../../src-renderer/cell/channel-groups.ts';
import { makeUpOf, shaped, withChannel } from '../../src-renderer/state/edits/cell.ts';
import { madeCell } from '../../src-renderer/state/made-cell.ts';
import { smallPlan } from '../support/small-plans.ts';

const listed = listedChannels(22);

describe('the groups of the channel browser', () => {
  it('hold every published channel once', () => {
    const ids = channelGroups(listed, [], []).flatMap(({ entries }) => entries.map(({ id }) => id));
    expect(ids.toSorted()).toEqual(listed.map(({ id }) => id).toSorted());
  });

  it("begin with the cell's own, which hide published ones of the same name, and mark what is there", () => {
    const own = [{ name: 'k-golomb' }, { name: 'na-golomb-2007' }].map(({ name }) => ({
      ...{ name, reversal_mV: 0, gates: [] },
    }));
    const groups = channelGroups(listed, own, ['k-golomb', 'h-kole-2006']);
    expect(groups[0]!.entries.map(({ id }) => id)).toEqual(['k-golomb', 'na-golomb-2007']);
    const all = groups.flatMap(({ entries }) => entries);
    expect(all.filter(({ id }) => id === 'na-golomb-2007')).toHaveLength(1);
    expect(all.filter(({ isThere }) => isThere).map(({ id }) => id)).toEqual(['k-golomb', 'h-kole-2006']);
  });
});

describe('the curves of a channel', () => {
  it.each(listed)('$id: one of each per gate, none for the time constant of a gate that follows at once', (channel) => {
    const slow = channel.gates.filter((gate) => !followsAtOnce(gate)).map(({ name }) => name);
    expect(steadySeries(channel).map(({ key }) => key)).toEqual(channel.gates.map(({ name }) => name));
    expect(timeSeries(channel).map(({ key }) => key)).toEqual(slow);
    // A gate is drawn alike in both charts.
    for (const series of timeSeries(channel)) {
      const other = steadySeries(channel).find(({ key }) => key === series.key);
      expect([series.stroke, series.paint]).toEqual([other?.stroke, other?.paint]);
    }
  });

  it('are told with the powers of their gates', () => {
    expect(
      gatesWords([
        { name: 'm', power: 3 },
        { name: 'h', power: 1 },
      ]),
    ).toBe('m³·h');
  });
});

describe('adding a channel', () => {
  const cell = madeCell('a ball', { kind: 'sphere', diameter_um: 20 });
  const plan = smallPlan({ cell });
  const region = shaped(cell)!.makeUp[0]!.region;

  it('puts it last with a density of 0 and leaves the rest as it was', () => {
    const added = withChannel(plan, region, 'h-kole-2006');
    const before = makeUpOf(plan, region)!;
    expect(makeUpOf(added, region)).toEqual({
      ...before,
      channels: [...before.channels, { channel: 'h-kole-2006', density_mS_cm2: 0 }],
    });
  });

  it('changes nothing where the region has it, or where there is no such region', () => {
    const added = withChannel(plan, region, 'h-kole-2006');
    expect(withChannel(added, region, 'h-kole-2006')).toEqual(added);
    expect(withChannel(plan, 'nowhere', 'h-kole-2006')).toEqual(plan);
  });
});
