/** npm run kill-loop -- --kills 1000 [--seed 1] [--control 20]: exit 0 if nothing was lost and the naive control was found out. */
import { parseArgs } from 'node:util';
import { isSound, killLoop } from './kill';

const { values } = parseArgs({
  options: {
    kills: { type: 'string', default: '100' },
    seed: { type: 'string', default: '1' },
    control: { type: 'string', default: '20' },
  },
});
const kills = Number(values.kills);
const control = Number(values.control);
if (!(kills > 0) || !(control > 0)) {
  console.error('Usage: npm run kill-loop -- --kills NUMBER [--seed NUMBER] [--control NUMBER]');
  process.exit(2);
}
const report = await killLoop(kills, 'store', Number(values.seed), (words) => console.log(words));
console.log(`store: ${JSON.stringify(report)}`);
const naive = await killLoop(control, 'naive', Number(values.seed));
console.log(`naive writer, the control: ${JSON.stringify(naive)}`);
const foundOut = naive.unreadable > 0;
if (!foundOut) console.log('The control was not found out, so this run proves nothing.');
console.log(isSound(report) ? 'Nothing that was answered as done was lost.' : 'SOMETHING WAS LOST.');
process.exitCode = isSound(report) && foundOut ? 0 : 1;
