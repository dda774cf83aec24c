/** A failure that a person can act on: its message is the whole sentence that is printed, without a stack. */
export class Failure extends Error {
  constructor(sentence, { detail = '', exitCode = 1 } = {}) {
    super(sentence);
    this.name = 'Failure';
    this.detail = detail;
    this.exitCode = exitCode;
  }
}

const DISK_SENTENCES = {
  EACCES: (path) =>
    `No permission to write ${path}: start as its owner, or set EBBLINE_DATA_DIR to a folder of your own.`,
  EPERM: (path) =>
    `No permission to change ${path}: start as its owner, or set EBBLINE_DATA_DIR to a folder of your own.`,
  EROFS: (path) => `${path} is on a read-only disk: set EBBLINE_DATA_DIR to a folder that can be written.`,
  ENOSPC: (path) => `The disk that holds ${path} is full: free some space and start again.`,
  EDQUOT: (path) => `The quota for ${path} is used up: free some space and start again.`,
  ENOENT: (path) => `${path} cannot be made: set EBBLINE_DATA_DIR to a folder that can be written.`,
  ENOTDIR: (path) => `A part of ${path} is a file, not a folder: set EBBLINE_DATA_DIR to another place.`,
  EEXIST: (path) => `${path} is a file, not a folder: set EBBLINE_DATA_DIR to another place.`,
};

/** Prints what went wrong; anything that is not a known kind of failure keeps its stack. */
export function describeFailure(error) {
  if (error instanceof Failure) return error.detail ? `${error.message}\n\n${error.detail}` : error.message;
  const sentence = DISK_SENTENCES[error?.code];
  if (sentence && error.path) return sentence(error.path);
  return `Unexpected failure: ${error?.stack ?? error}`;
}
