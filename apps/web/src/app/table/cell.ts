import { Directive, inject, input, TemplateRef } from '@angular/core';
import type { Column } from './column';

/** `<ng-template [tgCell]="columns.name" let-row>`: how the cells of one column look. */
@Directive({ selector: '[tgCell]' })
export class Cell<Row> {
  readonly tgCell = input.required<Column<Row>>();
  readonly template = inject<TemplateRef<{ $implicit: Row }>>(TemplateRef);

  static ngTemplateContextGuard<Row>(_cell: Cell<Row>, _context: unknown): _context is { $implicit: Row } {
    return true;
  }
}
