export interface Surroundings {
  readonly platform: NodeJS.Platform;
  readonly env: Readonly<Record<string, string | undefined>>;
  /** True for the superuser, as which neither Electron nor a browser runs its sandbox. */
  readonly isRoot: boolean;
}

export function ownSurroundings(): Surroundings {
  return { platform: process.platform, env: process.env, isRoot: process.getuid?.() === 0 };
}

/** True where a window can be shown to the person at this terminal. */
export function hasDisplay({ platform, env }: Surroundings): boolean {
  if (platform === "darwin" || platform === "win32") return !env.SSH_CONNECTION;
  return Boolean(env.DISPLAY || env.WAYLAND_DISPLAY);
}

/** Why the desktop window cannot be shown, as the end of a sentence; undefined where nothing is known against it. */
export function noDesktopReason(surroundings: Surroundings): string | undefined {
  if (!hasDisplay(surroundings)) return "there is no display";
  if (surroundings.isRoot && surroundings.platform === "linux") return "its sandbox does not run as root";
  return undefined;
}

/** The command that shows an address in the person's browser, its last argument being the address. */
export function browserCommand(platform: NodeJS.Platform): readonly [string, ...string[]] {
  if (platform === "darwin") return ["open"];
  // `start` is of the shell only, and would read the address's signs as its own; this one does not.
  if (platform === "win32") return ["rundll32", "url.dll,FileProtocolHandler"];
  return ["xdg-open"];
}
