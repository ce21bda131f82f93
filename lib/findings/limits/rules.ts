import { type LimitKind } from '@/lib/loading/limits';

import { type Rule } from '../rule';

const PRACTICE = 'Common practice, no source';
const REMEDY =
  'See which rows the figure is made of, mend them or state what is being done. The limit and its source stand in the settings.';

/**
 * A figure beyond a limit is a fact about the aircraft and no mistake in the data, so that none of these is a blocker: a heavy
 * aircraft can be submitted, and the chief engineer reads why. What binds towards others asks for an answer; what the program set
 * itself is told.
 */
export const LIMIT_RULES: Readonly<Record<LimitKind, Rule>> = {
  contract: {
    id: 'beyond-contract',
    severity: 'warning',
    sees: 'A basic or predicted figure beyond a limit of the contract.',
    why: 'What was promised is not met, or will not be once what is predicted has come true.',
    remedy: REMEDY,
    source: PRACTICE,
  },
  specification: {
    id: 'beyond-specification',
    severity: 'warning',
    sees: 'A basic or predicted figure beyond a limit of a specification.',
    why: 'Strength, stability or handling were worked out for figures within it.',
    remedy: REMEDY,
    source: PRACTICE,
  },
  target: {
    id: 'beyond-target',
    severity: 'note',
    sees: 'A basic or predicted figure beyond a target of the program.',
    why: 'The program set itself this figure and is not there.',
    remedy: REMEDY,
    source: PRACTICE,
  },
  allocation: {
    id: 'beyond-allocation',
    severity: 'note',
    sees: 'A basic or predicted figure beyond what was allocated.',
    why: 'What one group takes more, another has to give.',
    remedy: REMEDY,
    source: PRACTICE,
  },
};

export const limitNotJudged: Rule = {
  id: 'limit-not-judged',
  severity: 'note',
  sees: 'A limit or target in force that cannot be held against this condition.',
  why: 'It says neither that the limit is kept nor that it is broken.',
  remedy: 'State it in the frame issue in use, name a group that the lists have, or set its last day.',
  source: 'First principles',
};
