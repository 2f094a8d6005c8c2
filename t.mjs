import { clips, prepareClips } from './scripts/bench/clips.mjs';
const t=Date.now();
for (const c of clips) { await prepareClips([c]); console.log(c.file, Date.now()-t); }
