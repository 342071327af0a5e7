#!/usr/bin/env node
import { Command } from 'commander';
import { CAUTION } from '../domain/caution.ts';
import { EXIT } from '../domain/errors.ts';
import { GENERATOR } from '../domain/generator.ts';
import { cleanCommand, withCleanOptions } from './clean-command.ts';
import { compareCommand, withCompareOptions } from './compare-command.ts';
import { reportFailure } from './failure.ts';
import { withHandChecks } from './hand-check-options.ts';
import { type RunFlags, runCommand, withRunOptions } from './run-command.ts';

const program = new Command('pinwright')
  .description('Turns a steel roof in an IFC model into a pin-jointed truss, judges and solves it, and writes it back.')
  .version(GENERATOR.version)
  .exitOverride()
  .showHelpAfterError('(pinwright --help shows the commands)')
  .addHelpText(
    'after',
    `\nExit codes: 0 done; 1 done, with faults found; 2 wrong command or brief; 3 unreadable model; 70 a fault of our own.\n\n${CAUTION}`,
  );

// A reader that has seen enough (`| head`) closes the pipe; that is no fault.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
});

let exitCode: number = EXIT.done;

withRunOptions(program.command('survey'))
  .description('read, join and judge a model; needs no supports or loads')
  .addHelpText('after', '\nExample:\n  pinwright survey roof.ifc --brief roof.yaml')
  .action(async (model: string, flags: RunFlags) => {
    exitCode = await runCommand(model, 'survey', flags);
  });

withHandChecks(withRunOptions(program.command('analyse')))
  .description('everything: read, join, judge, load and solve a model')
  .addHelpText(
    'after',
    '\nExample:\n  pinwright analyse roof.ifc --brief roof.yaml -o forces.json -o roof-with-forces.ifc\n  pinwright analyse roof.ifc --brief roof.yaml --joint 12,18,6.4 --cut x=7.5',
  )
  .action(async (model: string, flags: RunFlags) => {
    exitCode = await runCommand(model, 'analyse', flags);
  });

withCompareOptions(program.command('compare'))
  .description('what changed from one revision to the next, and what it did to the forces')
  .addHelpText('after', '\nExample:\n  pinwright compare roof-a.ifc roof-b.ifc --brief roof.yaml -o changes.json')
  .action(async (...[old, now, flags]: Parameters<typeof compareCommand>) => {
    exitCode = await compareCommand(old, now, flags);
  });

withCleanOptions(program.command('clean'))
  .description('the model without what Pinwright has written into it')
  .addHelpText('after', '\nExample:\n  pinwright clean roof-with-forces.ifc -o roof.ifc')
  .action(cleanCommand);

try {
  await program.parseAsync();
} catch (error) {
  exitCode = reportFailure(error);
}
process.exitCode = exitCode;
