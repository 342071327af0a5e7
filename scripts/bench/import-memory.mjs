// Run by import.mjs in a process of its own: `node import-memory.mjs FILE` prints the members read and the bytes that reading
// the file took at its peak, beyond what the loaded program takes.
import { readFileSync } from 'node:fs';
import { importModel, openStep } from '../../dist/index.js';

const before = process.memoryUsage().rss;
const { members } = await importModel(openStep(readFileSync(process.argv[2])));
const peak = process.resourceUsage().maxRSS * 1024;
console.log(JSON.stringify({ members: members.length, bytes: peak - before }));
