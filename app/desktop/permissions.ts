/**
 * What a page may have of the machine beyond drawing itself. Electron grants by default, so every request, check and device is
 * answered from here: each yes stands with its reason, all else is refused.
 */
const GRANTED: { readonly [permission: string]: string } = {
  'clipboard-sanitized-write':
    'a working or a table is copied as text when the user presses for it; reading stays refused',
};

/** Whether a permission is granted; every one that is not listed is refused. */
export const isGranted = (permission: string): boolean => Object.hasOwn(GRANTED, permission);

type Guarded = {
  setPermissionRequestHandler(
    handler: (contents: unknown, permission: string, answer: (granted: boolean) => void) => void,
  ): void;
  setPermissionCheckHandler(handler: (contents: unknown, permission: string) => boolean): void;
  setDevicePermissionHandler(handler: () => boolean): void;
  on(event: 'will-download', listener: (event: { preventDefault(): void }) => void): unknown;
};

/** Answers all three questions of a session from the table, and refuses downloads: files are written by us, where the user says. */
export function guardSession(session: Guarded): void {
  session.setPermissionRequestHandler((_contents, permission, answer) => answer(isGranted(permission)));
  session.setPermissionCheckHandler((_contents, permission) => isGranted(permission));
  session.setDevicePermissionHandler(() => false);
  session.on('will-download', (event) => event.preventDefault());
}
