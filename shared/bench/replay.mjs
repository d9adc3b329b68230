/**
 * `npm run --silent replay -- DIR/index.json`: one JSON line an alert on stdout, figures on stderr where the truth is told.
 */
import { replayTrace } from './replay-trace.mjs';
import { scoreCatch, scoreLines } from './score.mjs';
import { readTraces } from './traces.mjs';

const indexFile = process.argv[2];
if (indexFile === undefined) {
  console.error('Usage: npm run --silent replay -- DIR/index.json');
  process.exit(2);
}

const scores = [];
for (const trace of readTraces(indexFile)) {
  const { alerts } = replayTrace(trace);
  for (const { t, stage } of alerts) console.log(JSON.stringify({ trace: trace.name, t, stage }));
  if (trace.truth) scores.push(scoreCatch(trace, alerts));
}
if (scores.length > 0) console.error(scoreLines(scores).join('\n'));
