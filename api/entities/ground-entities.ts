import { AllocationEntity } from '#api/entities/allocation.entity.ts'
import { AttachmentEntity } from '#api/entities/attachment.entity.ts'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { CalibrationEntity } from '#api/entities/calibration.entity.ts'
import { CellEntity } from '#api/entities/cell.entity.ts'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { DefaultViewEntity } from '#api/entities/default-view.entity.ts'
import { DispositionEntity } from '#api/entities/disposition.entity.ts'
import { DispositionCellEntity } from '#api/entities/disposition-cell.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { GaugeEntity } from '#api/entities/gauge.entity.ts'
import { GaugeCalibrationEntity } from '#api/entities/gauge-calibration.entity.ts'
import { GaugeCorrectionEntity } from '#api/entities/gauge-correction.entity.ts'
import { GaugeOutageEntity } from '#api/entities/gauge-outage.entity.ts'
import { InspectionEntity } from '#api/entities/inspection.entity.ts'
import { InspectionCellEntity } from '#api/entities/inspection-cell.entity.ts'
import { LiftTotalEntity } from '#api/entities/lift-total.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { OnePointCheckEntity } from '#api/entities/one-point-check.entity.ts'
import { PlacementEntity } from '#api/entities/placement.entity.ts'
import { PlacementCellEntity } from '#api/entities/placement-cell.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { ReleaseEntity } from '#api/entities/release.entity.ts'
import { ReleaseCellEntity } from '#api/entities/release-cell.entity.ts'
import { ReworkCellEntity } from '#api/entities/rework-cell.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { ReworkStepEntity } from '#api/entities/rework-step.entity.ts'
import { SavedViewEntity } from '#api/entities/saved-view.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import { StandardCountEntity } from '#api/entities/standard-count.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { TestVerdictEntity } from '#api/entities/test-verdict.entity.ts'
import { ZoneEntity } from '#api/entities/zone.entity.ts'

/** The tables of the earthwork: what was set up, the facts, and what is derived from them. */
export const groundEntities = [
  ZoneEntity,
  SpecificationEntity,
  CellEntity,
  CellLiftEntity,
  LiftTotalEntity,
  BorrowMaterialEntity,
  CalibrationEntity,
  ReferenceCurveEntity,
  OnePointCheckEntity,
  LotEntity,
  PlacementEntity,
  PlacementCellEntity,
  FieldTestEntity,
  TestMarkEntity,
  TestVerdictEntity,
  AllocationEntity,
  StakeEntity,
  ReworkOrderEntity,
  ReworkCellEntity,
  ReworkStepEntity,
  ReleaseEntity,
  ReleaseCellEntity,
  InspectionEntity,
  InspectionCellEntity,
  DispositionEntity,
  DispositionCellEntity,
  GaugeEntity,
  GaugeCalibrationEntity,
  GaugeOutageEntity,
  StandardCountEntity,
  GaugeCorrectionEntity,
  AttachmentEntity,
  SavedViewEntity,
  DefaultViewEntity,
]
