/**
 * A disk in memory that records every operation, and what could be on it if the power had failed
 * after any of them: writes that were not synced may be missing, cut or kept, and changes of names
 * that were not synced may be kept in any selection.
 */
import { dirname } from 'node:path';
import type { FsPort, OpenFile } from '../../src-main/store/fs-port';

type File = number;
interface Data {
  readonly kind: 'data';
  readonly file: File;
  readonly at: number;
  readonly bytes: Uint8Array;
}
/** One change of names that happens at once: each path gets a file, or none. */
interface Names {
  readonly kind: 'names';
  readonly changes: readonly (readonly [string, File | null])[];
}
export type Operation =
  | Data
  | Names
  | { readonly kind: 'sync'; readonly file: File }
  | { readonly kind: 'sync-folder'; readonly folder: string }
  | { readonly kind: 'folder'; readonly folder: string };

const fault = (code: string, path: string) => Object.assign(new Error(`${code}: ${path}`), { code });

export class MemoryDisk {
  readonly operations: Operation[] = [];
  readonly #names = new Map<string, File>();
  readonly #contents = new Map<File, Uint8Array>();
  readonly #folders = new Set<string>(['/sites']);
  #files = 0;

  static holding(contents: ReadonlyMap<string, Uint8Array>): MemoryDisk {
    const disk = new MemoryDisk();
    for (const [path, bytes] of contents) {
      const file = ++disk.#files;
      disk.#contents.set(file, bytes);
      disk.#names.set(path, file);
      for (let folder = dirname(path); folder !== '/'; folder = dirname(folder)) disk.#folders.add(folder);
    }
    return disk;
  }

  names(): readonly string[] {
    return [...this.#names.keys()].sort();
  }

  readonly fs: FsPort = {
    read: async (path) => this.#contentAt(path).slice(),
    facts: async (path) => {
      if (this.#folders.has(path)) return { bytes: 0, changed: 0, isFolder: true };
      return { bytes: this.#contentAt(path).length, changed: 0, isFolder: false };
    },
    list: async (folder) => {
      this.#needFolder(folder);
      return this.names().flatMap((path) => (dirname(path) === folder ? [path.slice(folder.length + 1)] : []));
    },
    makeFolder: async (folder) => {
      this.#needFolder(dirname(folder));
      if (this.#folders.has(folder)) return;
      this.#folders.add(folder);
      this.operations.push({ kind: 'folder', folder });
    },
    create: async (path) => {
      if (this.#names.has(path)) throw fault('EEXIST', path);
      return this.#open(path);
    },
    append: async (path) => this.#open(path),
    rename: async (from, to) => {
      const file = this.#fileAt(from);
      this.#change([
        [to, file],
        [from, null],
      ]);
    },
    link: async (from, to) => {
      if (this.#names.has(to)) throw fault('EEXIST', to);
      this.#change([[to, this.#fileAt(from)]]);
    },
    remove: async (path) => {
      this.#fileAt(path);
      this.#change([[path, null]]);
    },
    touch: async (path) => void this.#fileAt(path),
    syncFolder: async (folder) => {
      this.#needFolder(folder);
      this.operations.push({ kind: 'sync-folder', folder });
    },
  };

  #needFolder(folder: string): void {
    if (!this.#folders.has(folder)) throw fault('ENOENT', folder);
  }

  #fileAt(path: string): File {
    const file = this.#names.get(path);
    if (file === undefined) throw fault('ENOENT', path);
    return file;
  }

  #contentAt(path: string): Uint8Array {
    return this.#contents.get(this.#fileAt(path)) ?? new Uint8Array();
  }

  #change(changes: Names['changes']): void {
    for (const [path, file] of changes) {
      this.#needFolder(dirname(path));
      if (file === null) this.#names.delete(path);
      else this.#names.set(path, file);
    }
    this.operations.push({ kind: 'names', changes });
  }

  #open(path: string): OpenFile {
    let file = this.#names.get(path);
    if (file === undefined) {
      file = ++this.#files;
      this.#contents.set(file, new Uint8Array());
      this.#change([[path, file]]);
    }
    const own = file;
    const content = () => this.#contents.get(own) ?? new Uint8Array();
    return {
      write: async (bytes) => {
        this.operations.push({ kind: 'data', file: own, at: content().length, bytes: bytes.slice() });
        this.#contents.set(own, Uint8Array.from([...content(), ...bytes]));
      },
      sync: async () => void this.operations.push({ kind: 'sync', file: own }),
      size: async () => content().length,
      cut: () => Promise.reject(fault('ENOSYS', path)),
      close: async () => undefined,
    };
  }
}

/** What may become of an operation that was not synced: `cut` keeps so many bytes of a write. */
export type Fate = 'kept' | 'lost' | { readonly cut: number };

/** Those operations of a prefix that nothing has made durable yet, by their index. */
export function unsynced(operations: readonly Operation[]): readonly number[] {
  return operations.flatMap((operation, i) => {
    const later = operations.slice(i + 1);
    if (operation.kind === 'data') return later.some((one) => one.kind === 'sync' && one.file === operation.file) ? [] : [i];
    if (operation.kind !== 'names') return [];
    const folders = operation.changes.map(([path]) => dirname(path));
    return folders.every((folder) => later.some((one) => one.kind === 'sync-folder' && one.folder === folder)) ? [] : [i];
  });
}

/** What is on the disk after a power cut, given the fate of each operation that was not synced. */
export function afterPowerCut(operations: readonly Operation[], fates: ReadonlyMap<number, Fate>): ReadonlyMap<string, Uint8Array> {
  const names = new Map<string, File>();
  const contents = new Map<File, Uint8Array>();
  operations.forEach((operation, i) => {
    const fate = fates.get(i) ?? 'kept';
    if (fate === 'lost') return;
    if (operation.kind === 'names') {
      for (const [path, file] of operation.changes) {
        if (file === null) names.delete(path);
        else names.set(path, file);
      }
    } else if (operation.kind === 'data') {
      const kept = fate === 'kept' ? operation.bytes : operation.bytes.slice(0, fate.cut);
      if (kept.length === 0) return;
      // A gap where an earlier write was lost reads as zeros.
      const before = contents.get(operation.file) ?? new Uint8Array();
      const after = new Uint8Array(Math.max(before.length, operation.at + kept.length));
      after.set(before);
      after.set(kept, operation.at);
      contents.set(operation.file, after);
    }
  });
  return new Map([...names].map(([path, file]) => [path, contents.get(file) ?? new Uint8Array()]));
}
