// The program's version, from the one place that has it.

export { version } from '../package.json';
