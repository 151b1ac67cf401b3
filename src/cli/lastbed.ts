#!/usr/bin/env node
import { Command, CommanderError } from "commander";
import { VERSION } from "../core/version.ts";
import { failedCall, wantsDocument } from "./call-document.ts";
import { failureOf } from "./failure.ts";
import { openScreen, surviveClosedOutput, tellFailure } from "./screen.ts";
import { verbs } from "./verbs/index.ts";
import type { Verb, VerbOptions } from "./verbs/verb.ts";

const program = new Command("lastbed")
  .description("When did each group really disappear, relative to a physical marker horizon?")
  .version(VERSION)
  .exitOverride();

for (const verb of verbs) program.addCommand(commandOf(verb));

function commandOf(verb: Verb): Command {
  const command = new Command(verb.name)
    .description(verb.summary)
    .exitOverride()
    .option("--json", "one JSON document on standard output; prose goes to standard error")
    .option("--quiet", "no prose and no progress")
    .option("--seed <number>", "seed of every random stream")
    .option("--threads <number>", "worker threads")
    .option("--set <path=value>", "a setting, as JSON or text; may be repeated", collect, [])
    .option("--figures <formats>", "figure formats (svg)", "svg");
  for (const parameter of verb.parameters) command.argument(parameter);
  if (verb.needsOut) command.requiredOption("--out <folder>", "where results are written");
  if (verb.name === "open") command.option("--port <number>", "port on this machine", "0");
  return command.action(async (...args: unknown[]) => {
    const words = args
      .slice(0, verb.parameters.length)
      .flat()
      .filter((word) => typeof word === "string");
    const options: VerbOptions = command.opts();
    process.exitCode = await verb.act(words, options, openScreen(options));
  });
}

function collect(value: string, earlier: readonly string[]): readonly string[] {
  return [...earlier, value];
}

surviveClosedOutput();

try {
  await program.parseAsync();
} catch (error) {
  const isCommander = error instanceof CommanderError;
  if (isCommander) process.exitCode = error.exitCode === 0 ? 0 : 2;
  else tellFailure(error);
  const words = process.argv.slice(2);
  if (process.exitCode !== 0 && wantsDocument(words)) {
    const failure = isCommander ? { message: error.message, exitCode: 2 as const } : failureOf(error);
    process.stdout.write(failedCall(words, failure));
  }
}
