import { describe, expect, it } from 'vitest';
import { expectedTerminals } from '../../src/contract/expected-terminals';
import { obstacle } from '../../src/warnings/obstacle';
import { registeredLine, withTransformer } from '../ingest/made-up-feed';

const out = (line: ReturnType<typeof registeredLine>, ...keys: string[]) => ({
  ...line,
  terminals: line.terminals.map((terminal) => ({ ...terminal, inService: !keys.includes(terminal.key) })),
});

describe('what keeps a line from being evaluated', () => {
  const three = registeredLine({}, ['arden', 'birk', 'corl']);
  const reported = registeredLine({ goesBy: 'reported' });

  it.each([
    ['nothing, with two terminals and settings', registeredLine(), undefined],
    ['nothing, when two of three terminals are in service', out(three, 'birk'), undefined],
    ['one terminal left in service', out(three, 'birk', 'corl'), /one terminal in service.*at least two/],
    ['no terminal in service', out(three, 'arden', 'birk', 'corl'), /no terminal in service/],
    ['no terminal at all', registeredLine({}, []), /no terminal in service/],
    ['no settings', registeredLine({ settings: [] }), /no settings/],
    ['a transformer in the zone', registeredLine(withTransformer()), /transformer stands in the zone/],
    [
      'nothing, with one terminal, on a line that goes by reported magnitudes',
      registeredLine({ goesBy: 'reported' }, ['arden']),
      undefined,
    ],
    ['no terminal in service on such a line', out(reported, 'arden', 'birk'), /no terminal in service/],
  ] as const)('is %s', (_, line, reason) => {
    if (reason === undefined) expect(obstacle(line)).toBeUndefined();
    else expect(obstacle(line)).toMatch(reason);
  });
});

describe('the terminals that make a snapshot complete', () => {
  it('are all in service, in the order of their positions', () => {
    const three = registeredLine({}, ['arden', 'birk', 'corl']);
    expect(expectedTerminals(out(three, 'birk'))).toEqual(['arden', 'corl']);
  });

  it('are the first in service alone on a line that goes by reported magnitudes', () => {
    const reported = registeredLine({ goesBy: 'reported' });
    expect(expectedTerminals(reported)).toEqual(['arden']);
    expect(expectedTerminals(out(reported, 'arden'))).toEqual(['birk']);
  });
});
