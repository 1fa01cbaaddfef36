import type { Routes } from '@angular/router';
import { titles } from '../paths';
import { Board } from './board';
import { BoardList } from './board-list';

export const boardsRoutes: Routes = [
  { path: '', pathMatch: 'full', title: titles.boards, component: BoardList },
  { path: ':boardId', title: titles.board, component: Board },
];
