// `npm run bench -- import joining-faults`: prints ratios and times; with no name, all of them.
const BENCHES = ['import', 'joining', 'joining-faults', 'write-back', 'statics', 'cases'];
const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !BENCHES.includes(name));
if (unknown.length > 0) {
  console.error(`no benchmark ${unknown.join(', ')}; there are ${BENCHES.join(', ')}`);
  process.exit(2);
}
for (const name of asked.length > 0 ? asked : BENCHES) {
  console.log(`\n${name}`);
  const { run } = await import(`./${name}.mjs`);
  await run();
}
