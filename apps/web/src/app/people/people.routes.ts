import type { Routes } from '@angular/router';
import { People } from './people';

export const peopleRoutes: Routes = [{ path: '', component: People }];
