const REASONS: { readonly [code: string]: string } = {
  EACCES: 'the system refuses access',
  EPERM: 'the system refuses access',
  EROFS: 'the disk may only be read',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  ENOENT: 'its folder is no longer there',
  EISDIR: 'there is a folder of that name',
  ENAMETOOLONG: 'the name is too long',
};

/** Why the system would not write a file, in words. */
export function writeReason(error: unknown): string {
  const { code } = error as NodeJS.ErrnoException;
  return REASONS[code ?? ''] ?? `the system answered ${code ?? 'nothing that helps'}`;
}
