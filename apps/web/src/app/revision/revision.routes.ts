import type { Routes } from '@angular/router';
import { RevisionPage } from './revision';

export const revisionRoutes: Routes = [{ path: '', component: RevisionPage }];
