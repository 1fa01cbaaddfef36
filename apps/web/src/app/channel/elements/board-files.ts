import { HttpClient, HttpEventType, type HttpEvent } from '@angular/common/http';
import { inject, Injectable, signal } from '@angular/core';
import type { BoardFile } from '@tollgate/contracts';
import { finalize, map, type Observable, tap } from 'rxjs';
import { ApiClient } from '../../api/api-client';

/** The Touchstone files of the channel's board, read once and added to by uploads. One a screen. */
@Injectable()
export class BoardFiles {
  private readonly api = inject(ApiClient);
  private readonly http = inject(HttpClient);
  private readonly list = signal<readonly BoardFile[] | undefined>(undefined);
  private readonly share = signal<number | undefined>(undefined);
  private asked = '';

  /** Undefined until read. */
  readonly files = this.list.asReadonly();
  /** How much of an upload has gone out, 0 to 1; undefined while there is none. */
  readonly progress = this.share.asReadonly();

  read(boardId: string): void {
    if (this.asked === boardId) return;
    this.asked = boardId;
    this.api
      .get<{ items: BoardFile[] }>(`/boards/${boardId}/files`)
      .subscribe(({ items }) => this.list.set(items));
  }

  /** Sends a file; the result is what the server read in it. */
  upload(boardId: string, file: File): Observable<BoardFile | undefined> {
    this.share.set(0);
    return this.http
      .post<BoardFile>(`/api/boards/${boardId}/files`, file, {
        params: { name: file.name },
        headers: { 'Content-Type': 'application/octet-stream' },
        observe: 'events',
        reportProgress: true,
      })
      .pipe(
        tap((event) => this.note(event)),
        map((event) => (event.type === HttpEventType.Response ? (event.body ?? undefined) : undefined)),
        tap((added) => {
          if (added)
            this.list.update((files) => [added, ...(files ?? []).filter((each) => each.id !== added.id)]);
        }),
        finalize(() => this.share.set(undefined)),
      );
  }

  private note(event: HttpEvent<BoardFile>): void {
    if (event.type === HttpEventType.UploadProgress && event.total)
      this.share.set(event.loaded / event.total);
  }
}
