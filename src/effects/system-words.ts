type Words = readonly [found: string, allowed: string];

/** What was found and what is allowed, by the error codes of POSIX.1-2017 (XSH 2.3) and of Node. */
export const SYSTEM_WORDS: Readonly<Record<string, Words>> = {
  ENOENT: ["there is no such file or folder", "a file, in a folder that exists"],
  ENOTDIR: ["a part of the path is a file, not a folder", "a path that leads through folders"],
  EISDIR: ["it is a folder", "a file"],
  EACCES: ["access to it is denied", "a file and folder that you have the rights to"],
  EPERM: ["access to it is denied", "a file and folder that you have the rights to"],
  EROFS: ["it is on a read-only file system", "a file on a disk that can be written"],
  ENOSPC: ["the disk is full; nothing was changed", "a disk with free space"],
  EDQUOT: ["your quota of the disk is used up; nothing was changed", "a disk with free space"],
  EFBIG: ["the system does not let a file grow that far; nothing was changed", "a higher limit on file size"],
  EEXIST: ["there is something of that name already", "a name that is free"],
  ELOOP: ["its links lead round in a circle", "a link that leads to a file"],
  ENAMETOOLONG: ["the name is too long for the file system", "a shorter name"],
  EMFILE: ["too many files are open", "a try later on"],
  ENFILE: ["too many files are open", "a try later on"],
  EBUSY: ["it is in use by the system", "a file that nothing else holds"],
  EIO: ["the disk reports a fault", "a disk in order"],
  ENXIO: ["it is a device or socket", "a file"],
  ENODEV: ["it is a device", "a file"],
  ENOTEMPTY: ["it is a folder with something in it", "a file"],
  ESTALE: ["the network drive has lost it", "a drive that is connected"],
  ERR_INVALID_ARG_VALUE: ["the name holds a NUL character", "a name without NUL"],
};
