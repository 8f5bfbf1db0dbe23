const REASONS: { readonly [code: string]: string } = {
  EACCES: 'the system refuses access',
  EPERM: 'the system refuses access',
  EROFS: 'the disk may only be read',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  ENOENT: 'its folder is not there',
  ENOTDIR: 'what should be its folder is a file',
  EINVAL: 'what is there is no ordinary file',
  EFBIG: 'the disk takes no file of that size',
  EIO: 'the disk failed',
  EBUSY: 'another program holds it',
  EISDIR: 'there is a folder of that name',
  ENAMETOOLONG: 'the name is too long',
};

/** Why the system would not write a file, in words. */
export function writeReason(error: unknown): string {
  const { code } = error as NodeJS.ErrnoException;
  return REASONS[code ?? ''] ?? `the system answered ${code ?? 'nothing that helps'}`;
}
