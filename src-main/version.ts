import { version } from '../package.json';

/** The program's version, written into every file it saves. */
export const VERSION = version;
