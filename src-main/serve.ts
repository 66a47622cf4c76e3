/** npm run serve -- [--port N] [--sites FOLDER] [--quiet]: the program for a browser on this machine. */
import { serveUntilStopped } from './serve-command';

await serveUntilStopped(process.argv.slice(2));
