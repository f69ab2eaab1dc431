/** What the system answers when a file cannot be written, in words of ours. */
import { SimError } from '../../sim/error.ts';

/** A SimError for what the user can mend; anything else as it is. */
export function writingFault(folder: string, error: unknown, mend = 'Choose another folder with -o'): unknown {
  const fault = writingFaults[(error as NodeJS.ErrnoException).code ?? ''];
  return fault === undefined ? error : new SimError(folder, fault, mend, error);
}

const writingFaults: Readonly<Record<string, string>> = {
  EACCES: 'the output folder may not be written',
  EPERM: 'the output folder may not be written',
  EROFS: 'the output folder is on a read-only disk',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  EFBIG: 'a file would be larger than allowed here',
  ENOENT: 'the output folder cannot be made here',
  EEXIST: 'a file stands where the output folder should be',
  ENOTDIR: 'a part of this path is a file, not a folder',
  ENAMETOOLONG: 'this path is too long',
  ELOOP: 'this path goes round in links',
  EIO: 'the disk failed',
  EMFILE: 'too many files are open',
  ENFILE: 'too many files are open',
};
