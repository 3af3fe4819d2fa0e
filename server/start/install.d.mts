export type LockedPackage = { version?: string; integrity?: string; optional?: boolean; peer?: boolean };
export type PackageLock = { packages: Record<string, LockedPackage> };

export function installedMatches(wanted: PackageLock, installed: PackageLock): boolean;
export function ensureInstalled(root: string): Promise<void>;
