import type { Command } from 'commander';
import { RequestError } from '../domain/errors.ts';
import { count } from '../domain/verdict.ts';
import { clean } from '../exporter/ifc/annotate.ts';
import { setTracesAside } from '../exporter/ifc/own-traces.ts';
import { planOutputs } from '../exporter/outputs.ts';
import { writeOutputs } from '../exporter/write-outputs.ts';
import { zipOne } from '../exporter/zip-one.ts';
import { openModel } from '../importer/files/open-model.ts';
import { namingModel } from './failure.ts';
import { readModelBytes } from './read-files.ts';

interface CleanFlags {
  readonly output: string;
  readonly quiet?: boolean;
}

/** Adds the options of `clean`. */
export function withCleanOptions(command: Command): Command {
  return command
    .argument('<model>', 'an IFC file with results in it')
    .requiredOption('-o, --output <file>', 'the model without them (.ifc or .ifczip)')
    .option('--quiet', 'say nothing');
}

/** Writes the model without what Pinwright has put into it: byte for byte as it was, where our comments still stand. */
export async function cleanCommand(model: string, { output, quiet }: CleanFlags): Promise<void> {
  const plan = planOutputs([output], model);
  if (!plan.files.every(({ content }) => content.kind === 'ifc' || content.kind === 'ifczip') || plan.stdout) {
    throw new RequestError(`${output}: clean writes a model; name an .ifc or .ifczip`);
  }
  const bytes = readModelBytes(model);
  const { traces, cleaned } = await namingModel(model, async () => {
    const aside = setTracesAside((await openModel(bytes)).file);
    return { traces: aside, cleaned: clean(aside.file) };
  });
  await writeOutputs(plan, (content) => (content.kind === 'ifczip' ? zipOne(content.name, cleaned) : cleaned));
  if (!quiet) process.stdout.write(`${told(model, traces)}\nWritten: ${output}\n`);
}

function told(model: string, { file, removed, kept }: ReturnType<typeof setTracesAside>): string {
  const inBlock = file.block?.instances.size ?? 0;
  const sentences = [
    inBlock > 0
      ? `${count(inBlock, 'instance')} of ours taken out of ${model}; the rest is as it was, byte for byte.`
      : null,
    removed > 0
      ? `The comments around our results are gone, so another program has rewritten ${model}: ${count(removed, 'instance')} ` +
        'known by GlobalId and set name taken out. This is an edit of that file, not the file as it was before.'
      : null,
    kept > 0
      ? `${count(kept, 'instance')} of ours had to stay, because other instances refer to ${kept === 1 ? 'it' : 'them'}.`
      : null,
  ].filter((sentence) => sentence !== null);
  return sentences.length > 0
    ? sentences.join('\n')
    : `${model} holds nothing of ours; the copy is the same, byte for byte.`;
}
