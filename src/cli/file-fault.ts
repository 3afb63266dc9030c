import { InputError } from "./core.ts";

const SENTENCES: Readonly<Record<string, string>> = {
  ENOENT: "there is no such file",
  EISDIR: "a file is needed; found a folder",
  ENOTDIR: "a folder of its path is a file",
  EACCES: "permission is denied",
  EPERM: "permission is denied",
  ELOOP: "its symbolic links run in a circle",
  ENAMETOOLONG: "the file name is too long",
  ENOSPC: "the disk is full",
  EROFS: "the file system is read-only",
  EEXIST: "a folder is needed; found a file",
  ERR_INVALID_ARG_VALUE: "a file name has no NUL in it",
  ERR_FS_FILE_TOO_LARGE: "the file is too large",
};

/** What the system said of a file, as a sentence for the user; anything that did not come from the system is given back as it is. */
export function fileFault(fault: unknown, file: string): unknown {
  if (!(fault instanceof Error) || !("code" in fault) || typeof fault.code !== "string") return fault;
  const sentence =
    SENTENCES[fault.code] ?? ("syscall" in fault ? `the system answers ${fault.code}` : undefined);
  return sentence === undefined ? fault : new InputError(sentence, { file });
}
