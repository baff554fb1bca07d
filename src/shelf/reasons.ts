const REASONS: Record<string, string> = {
  ENOSPC: 'the disk is full',
  EDQUOT: 'your share of the disk is full',
  EFBIG: 'the file may not grow so large here',
  EROFS: 'the disk can only be read',
  EACCES: 'no permission',
  EPERM: 'no permission',
  EISDIR: 'a folder stands where the file should',
  ENOENT: 'no folder can be made there',
  ENOTDIR: 'part of the path is not a folder',
  EEXIST: 'part of the path is not a folder',
  ELOCKED: 'another shortstave holds it',
}

/** Why the disk refused, in a cook's words. */
export function reasonOf(error: unknown): string {
  const { code, message } = error as NodeJS.ErrnoException
  return REASONS[code ?? ''] ?? message
}
