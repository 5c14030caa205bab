import { zodToOpenAPIRegistry } from "@asteasolutions/zod-to-openapi";
import type { z } from "zod";
import { Definition, Figure, Input } from "@/lib/calculation/definition";
import {
  Caution,
  GivenInputs,
  GivenQuantity,
  GivenValue,
  LimitVerdict,
  Notice,
  ResultValue,
  RowsRequest,
  RunRequest,
  Step,
  TemplateEvaluation,
  UsedCell,
  UsedQuantity,
  UsedValue,
} from "@/lib/calculation/evaluation";
import { Material, Piece, Property } from "@/lib/calculation/material";
import { FaultOfRow, Problem, ProblemItem } from "@/lib/core/problem";
import * as materials from "@/lib/materials/schemas";
import * as records from "@/lib/records/schemas";
import * as templates from "@/lib/templates/schemas";

/** Schemas that the document names, so that a generated client names its types alike. */
const named: Record<string, z.ZodType> = {
  Problem,
  ProblemItem,
  FaultOfRow,
  Definition,
  DefinitionInput: Input,
  DefinitionFigure: Figure,
  MaterialDefinition: Material,
  MaterialProperty: Property,
  MaterialPiece: Piece,
  RunRequest,
  RowsRequest,
  GivenInputs,
  GivenValue,
  GivenQuantity,
  TemplateEvaluation,
  ResultValue,
  LimitVerdict,
  Caution,
  Notice,
  Step,
  UsedQuantity,
  UsedCell,
  UsedValue,
  Named: materials.Named,
  MaterialItem: materials.MaterialItem,
  MaterialPage: materials.MaterialPage,
  MaterialView: materials.MaterialView,
  MaterialRevisionView: materials.MaterialRevisionView,
  PropertyValue: materials.PropertyValue,
  TemplateItem: templates.TemplateItem,
  TemplatePage: templates.TemplatePage,
  TemplateView: templates.TemplateView,
  RevisionSummary: templates.RevisionSummary,
  RevisionPage: templates.RevisionPage,
  RevisionView: templates.RevisionView,
  InputSchema: templates.InputSchemaView,
  RowsEvaluation: templates.RowsEvaluation,
  Diagnostic: templates.DiagnosticView,
  DefinitionCheck: templates.DefinitionCheck,
  DefinitionEvaluation: templates.DefinitionEvaluation,
  QuantityPage: templates.QuantityPage,
  FunctionPage: templates.FunctionPage,
  CreateRecordBody: records.CreateRecordBody,
  RecordActor: records.RecordActor,
  RecordView: records.RecordView,
  RecordItem: records.RecordItem,
  RecordPage: records.RecordPage,
  Rerun: records.Rerun,
  Deviation: records.Deviation,
};

/** Gives each schema its name where it stands; `register` of a registry would name a copy that nothing uses. */
export function nameSchemas(): void {
  for (const [refId, schema] of Object.entries(named)) {
    if (!zodToOpenAPIRegistry.has(schema)) zodToOpenAPIRegistry.add(schema, { _internal: { refId } });
  }
}
