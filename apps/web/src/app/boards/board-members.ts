import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { roleTitles, type Member } from '@tollgate/contracts';
import { Cell } from '../table/cell';
import type { Column } from '../table/column';
import { DataTable } from '../table/data-table';

/** Who may open a board. */
@Component({
  selector: 'tg-board-members',
  imports: [Cell, DataTable, DatePipe, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './board-members.html',
})
export class BoardMembers {
  readonly members = input.required<readonly Member[]>();
  readonly mayManage = input.required<boolean>();

  protected readonly columns = {
    name: {
      key: 'name',
      title: 'Name',
      width: '34%',
      sortBy: (member) => member.name,
      text: (member) => member.name,
    },
    roles: {
      key: 'roles',
      title: 'Roles',
      text: (member) => member.roles.map((role) => roleTitles[role]).join(', '),
    },
    since: { key: 'since', title: 'Member since', width: '130px', sortBy: (member) => member.since },
    remove: { key: 'remove', title: 'Remove', hiddenTitle: true, width: '80px', align: 'end' },
  } as const satisfies Record<string, Column<Member>>;
  protected readonly columnList = Object.values(this.columns);
  protected readonly rowKey = (member: Member) => member.personId;
}
