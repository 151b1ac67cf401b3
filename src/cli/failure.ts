import { CallError } from "./call-error.ts";

/** What a failure says to a person, in lines without a stack, and the exit code it gives. */
export interface Failure {
  readonly message: string;
  readonly exitCode: 1 | 2;
}

/** A wrong call or a path that cannot be used is exit 2; anything else is a fault of the program. */
export function failureOf(error: unknown): Failure {
  if (error instanceof CallError) return { message: error.message, exitCode: 2 };
  if (isSystemError(error)) return { message: `lastbed: ${systemWords(error)}`, exitCode: 2 };
  const cause = error instanceof Error ? error.message : String(error);
  return {
    message: `lastbed: stopped by a fault of its own: ${firstLine(cause)}\n  The study is untouched. Please report this line together with the tables that bring it about.`,
    exitCode: 1,
  };
}

interface SystemError extends Error {
  readonly code: string;
  readonly syscall: string;
  readonly path?: string;
}

const isSystemError = (error: unknown): error is SystemError =>
  error instanceof Error && "syscall" in error && "code" in error && typeof error.code === "string";

const reasons: Readonly<Record<string, string>> = {
  ENOENT: "there is no such file",
  EACCES: "the system does not allow it",
  EPERM: "the system does not allow it",
  EROFS: "the disk is read-only",
  ENOSPC: "the disk is full",
  EEXIST: "a file of that name is in the way",
  ENOTDIR: "a part of the path is a file, not a folder",
  EISDIR: "it is a folder, not a file",
  ENAMETOOLONG: "the name is too long",
  EADDRINUSE: "the port is in use; name another with --port, or leave it out",
  ELOOP: "its links lead in a circle",
};

function systemWords({ code, syscall, path, message }: SystemError): string {
  const what = path === undefined ? syscall : `${syscall} ${path}`;
  return `expected to be able to ${what}, got ${code}: ${reasons[code] ?? firstLine(message)}`;
}

const firstLine = (text: string): string => text.split("\n", 1)[0];
