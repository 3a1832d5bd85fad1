import type { ViewContext } from '../../cells/kind.ts';
import type { Cell } from '../worksheet/format.ts';
import { type CellModel, computedOf, keepModel, titleOf, waitingWords } from './cell-model.ts';
import type { Page } from './page.ts';
import { referenceOf, sweepOf } from './strip-model.ts';
import { cellOf, visibleCells } from './wiring.ts';

/** Kinds whose pictures use the sweep; the others stay as they are when it changes. */
function usesSweep(page: Page, cell: Cell): boolean {
  return page.parts.registry[cell.kind]?.gives === 'claim';
}

/** Models of the shown cells; each is the object of the last time where nothing that it shows has changed. */
export class CellModels {
  #kept = new Map<string, CellModel>();

  of(page: Page, width: number): readonly CellModel[] {
    const sweep = sweepOf(page);
    const models = visibleCells(page.worksheet).map((cell) =>
      keepModel(this.#kept.get(cell.id), modelOf(page, cell, width, usesSweep(page, cell) ? sweep : null)),
    );
    this.#kept = new Map(models.map((model) => [model.cell.id, model]));
    return models;
  }
}

function modelOf(page: Page, cell: Cell, width: number, sweep: ViewContext['sweep']): CellModel {
  const { worksheet, parts, view } = page;
  const state = parts.engine.state(cell.id);
  const own = computedOf(state);
  const name = (id: string): string => {
    const above = cellOf(worksheet, id);
    return above === undefined ? 'a cell' : `the ${titleOf(parts.registry, above)}`;
  };
  return {
    cell,
    kind: parts.registry[cell.kind],
    state,
    context: { ...parts.engine.context(cell.id), own },
    resolved: parts.engine.settings(cell.id),
    recomputed: page.recomputed.get(cell.id) ?? 0,
    theme: view.theme,
    width,
    reference: referenceOf(page),
    sweep,
    opening: worksheet.opening.state,
    openBlank: view.blank?.cellId === cell.id ? view.blank.key : null,
    openPanel: view.panel?.cellId === cell.id ? view.panel.part : null,
    waitingFor: waitingWords(state, name),
  };
}
