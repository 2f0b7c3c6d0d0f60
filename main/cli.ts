// The command line: finds the verb, reads its options, runs it, and turns what happens into an exit code.

import { EngineError, nearest, shownText } from '../geometry/index.ts';
import { readArguments, usageFault } from './arguments.ts';
import { abandonWrites } from './files.ts';
import { COMMON_OPTIONS, generalHelp, verbHelp } from './help.ts';
import { EXIT, printJson, printMessage, printResult, reportError } from './output.ts';
import { VERBS } from './verbs/list.ts';
import type { Verb } from './verbs/verb.ts';
import { version } from './version.ts';

function findVerb(word: string): Verb {
  const found = VERBS.find(({ name }) => name === word);
  if (found !== undefined) return found;
  const names = VERBS.map(({ name }) => name);
  const allowed = `did you mean "${nearest(word, names)}"? verbs are ${names.join(', ')}`;
  throw new EngineError([usageFault(shownText(word), word, 'is not a verb', allowed)]);
}

async function run(words: readonly string[], asJson: boolean): Promise<number> {
  const [first, ...rest] = words;
  if (first === undefined) {
    printMessage(generalHelp());
    return EXIT.badInput;
  }
  if (first === '--help' || first === '-h' || first === 'help') {
    printResult(generalHelp());
    return EXIT.done;
  }
  if (first === '--version') {
    if (asJson) printJson({ format: 'etchwave-version/1', version });
    else printResult(version);
    return EXIT.done;
  }
  const verb = findVerb(first);
  if (rest.includes('--help')) {
    printResult(verbHelp(verb));
    return EXIT.done;
  }
  if (verb.load === undefined) {
    const names = VERBS.filter(({ load }) => load !== undefined).map(({ name }) => name);
    throw new EngineError([usageFault(verb.name, '', 'is not in this version', `verbs are ${names.join(', ')}`)]);
  }
  const args = readArguments(rest, [...verb.options, ...COMMON_OPTIONS], verb.operands);
  return (await verb.load())(args);
}

async function main(words: readonly string[]): Promise<void> {
  const asJson = words.includes('--json');
  process.on('SIGINT', () => {
    abandonWrites();
    process.exit(EXIT.cancelled);
  });
  // Whoever reads the output may stop early: that is not a fault.
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code !== 'EPIPE') throw error;
    process.exit(EXIT.done);
  });
  try {
    process.exitCode = await run(words, asJson);
  } catch (error) {
    process.exitCode = reportError(error, asJson);
  }
}

await main(process.argv.slice(2));
