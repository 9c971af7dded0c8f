import { describe, expect, it } from 'vitest';
import { readArguments, UsageFault } from '../../../shared/thermodynamics/commandLine/arguments.ts';

describe('the arguments of the command line', () => {
  it('name a command, a file and options in any order', () => {
    expect(
      readArguments(['evaluate', '--json', 'gas.massieu', '--at', 'T=300 [K]', '--quantity=p, U']),
    ).toEqual({
      command: 'evaluate',
      file: 'gas.massieu',
      json: true,
      at: 'T=300 [K]',
      with: '',
      quantities: ['p', 'U'],
    });
  });

  it('take a dash for standard input', () => {
    expect(readArguments(['properties', '-'])?.file).toBe('-');
  });

  it('ask for help by --help or by nothing at all', () => {
    expect(readArguments(['--help'])).toBeUndefined();
    expect(readArguments([])).toBeUndefined();
  });

  it.each([
    [['derive', 'x'], 'There is no command derive'],
    [['properties'], 'needs a file'],
    [['properties', 'a', 'b'], 'takes one file'],
    [['evaluate', 'a'], 'needs a state'],
    [['check', 'a', '--fast'], 'no option --fast'],
    [['evaluate', 'a', '--at'], '--at needs a value'],
  ])('are refused in words: %j', (words, message) => {
    expect(() => readArguments(words)).toThrow(UsageFault);
    expect(() => readArguments(words)).toThrow(message);
  });
});
