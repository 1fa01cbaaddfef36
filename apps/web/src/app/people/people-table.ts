import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { roleTitles, type Person } from '@tollgate/contracts';
import { map } from 'rxjs';
import { ApiClient } from '../api/api-client';
import { Confirmation, type ConfirmationData } from '../dialogs/confirmation';
import { Dialogs } from '../dialogs/dialogs';
import { routedDialogs } from '../dialogs/routed-dialogs';
import { SessionStore } from '../session/session-store';
import { Toasts } from '../states/toasts';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';
import { PersonDialog, type PersonDialogData } from './person-dialog';

/** Everybody with an account: invite, change roles, send a link, deactivate. */
@Component({
  selector: 'tg-people-table',
  imports: [Cell, DataTable, DatePipe, MatButton, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './people-table.html',
  styleUrl: './people-table.scss',
})
export class PeopleTable {
  private readonly api = inject(ApiClient);
  private readonly dialogs = inject(Dialogs);
  private readonly toasts = inject(Toasts);
  private readonly me = inject(SessionStore).person;

  protected readonly people = rxResource({
    stream: () => this.api.get<{ items: Person[] }>('/people').pipe(map((list) => list.items)),
  });
  private readonly byId = computed(
    () => new Map((this.people.hasValue() ? this.people.value() : []).map((person) => [person.id, person])),
  );

  protected readonly columns = {
    name: { key: 'name', title: 'Name', width: '24%', sortBy: (person) => person.name },
    email: {
      key: 'email',
      title: 'Mail address',
      width: '24%',
      sortBy: (person) => person.email,
      text: (person) => person.email,
    },
    roles: { key: 'roles', title: 'Roles', text: rolesOf },
    signedIn: {
      key: 'signed-in',
      title: 'Last sign-in',
      width: '140px',
      sortBy: (person) => person.lastSignInAt,
    },
    actions: { key: 'actions', title: 'Actions', hiddenTitle: true, width: '210px' },
  } as const satisfies Record<string, Column<Person>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (person: Person) => person.id;
  protected readonly filterBy = (person: Person) =>
    `${person.name} ${person.email} ${rolesOf(person)} ${stateOf(person)}`;
  protected readonly stateOf = stateOf;

  constructor() {
    routedDialogs({
      invite: () => this.openPerson({}),
      'edit-person': (id) => this.withPerson(id, (person) => this.openPerson({ person })),
      'send-link': (id) => this.withPerson(id, (person) => this.openSendLink(person)),
      deactivate: (id) => this.withPerson(id, (person) => this.openDeactivate(person)),
      activate: (id) => this.withPerson(id, (person) => this.openActivate(person)),
    });
  }

  protected isMe(person: Person): boolean {
    return person.id === this.me()?.id;
  }

  private withPerson<Ref>(id: string, open: (person: Person) => Ref): Ref | undefined {
    const person = this.byId().get(id);
    return person && open(person);
  }

  private openPerson(data: PersonDialogData) {
    const ref = this.dialogs.open<PersonDialog, PersonDialogData, Person>(PersonDialog, data);
    ref.afterClosed().subscribe((saved) => {
      if (!saved) return;
      this.toasts.done(data.person ? `${saved.name} is saved.` : `An invitation goes to ${saved.email}.`);
      this.people.reload();
    });
    return ref;
  }

  private openSendLink(person: Person) {
    return this.confirm(
      {
        heading: `Send ${person.name} a link?`,
        text: `A mail to ${person.email} carries a link, good for one use, to set a new password. The old one holds until then.`,
        action: 'Send the link',
        run: () => this.api.post(`/people/${person.id}/link`),
      },
      `The link is on its way to ${person.email}.`,
    );
  }

  private openDeactivate(person: Person) {
    return this.confirm(
      {
        heading: `Deactivate ${person.name}?`,
        text: 'Their sessions end at once and they cannot sign in. What they did stays in the record; they can be activated again.',
        action: 'Deactivate',
        run: () => this.api.patch(`/people/${person.id}`, { active: false }),
      },
      `${person.name} is deactivated.`,
    );
  }

  private openActivate(person: Person) {
    return this.confirm(
      {
        heading: `Activate ${person.name} again?`,
        text: 'They can sign in with the password and the roles they had.',
        action: 'Activate',
        run: () => this.api.patch(`/people/${person.id}`, { active: true }),
      },
      `${person.name} is active again.`,
    );
  }

  private confirm(data: ConfirmationData, done: string) {
    const ref = this.dialogs.open<Confirmation, ConfirmationData, boolean>(Confirmation, data);
    ref.afterClosed().subscribe((confirmed) => {
      if (!confirmed) return;
      this.toasts.done(done);
      this.people.reload();
    });
    return ref;
  }
}

function rolesOf(person: Person): string {
  return person.roles.map((role) => roleTitles[role]).join(', ');
}

function stateOf(person: Person): string {
  if (!person.active) return 'deactivated';
  return person.invited ? 'invited' : '';
}
