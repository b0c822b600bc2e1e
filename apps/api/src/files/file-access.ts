/** Who may read a file: its organisation, and whoever may see something that it is attached to. */
import { Injectable } from '@nestjs/common';
import type { Principal } from '@skyberth/shared';

/** Whether this person may read what is attached to the subject of that id. */
export type MayRead = (caller: Principal, subjectId: string) => boolean;

@Injectable()
export class FileAccess {
  private readonly kinds = new Map<string, MayRead>();

  /** Called once by each feature that attaches files, when its module starts. */
  register(subjectKind: string, mayRead: MayRead): void {
    if (this.kinds.has(subjectKind)) throw new Error(`Files of ${subjectKind} have a rule already.`);
    this.kinds.set(subjectKind, mayRead);
  }

  knows(subjectKind: string): boolean {
    return this.kinds.has(subjectKind);
  }

  /** False for a kind that nobody registered. */
  mayRead(caller: Principal, link: { readonly subjectKind: string; readonly subjectId: string }): boolean {
    return this.kinds.get(link.subjectKind)?.(caller, link.subjectId) ?? false;
  }
}
