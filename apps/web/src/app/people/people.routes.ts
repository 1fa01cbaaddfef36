import type { Routes } from '@angular/router';
import { AuditTrail } from './audit-trail';
import { Outbox } from './outbox';
import { People } from './people';
import { PeopleTable } from './people-table';

export const peopleRoutes: Routes = [
  {
    path: '',
    component: People,
    children: [
      { path: '', pathMatch: 'full', component: PeopleTable },
      { path: 'audit', title: 'Audit trail', component: AuditTrail },
      { path: 'outbox', title: 'Waiting mail', component: Outbox },
    ],
  },
];
