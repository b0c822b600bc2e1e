/** Where the bytes of files are kept, named by their SHA-256. */

export interface FileStorePort {
  /** Keeps the bytes; does nothing where they are kept already. Resolves once they would survive a power cut. */
  put(sha256: string, bytes: Uint8Array): Promise<void>;
  /** The bytes, or null where there are none of that name. */
  get(sha256: string): Promise<Buffer | null>;
  /** Forgets the bytes, at once: it is called in the transaction that deletes the last row that names them. */
  remove(sha256: string): void;
}

export const FILE_STORE = Symbol('FileStorePort');
