import type { TemplateId } from '../../contracts';
import { balancingCarrierDrawing } from './balancing-carrier';
import type { Drawing } from './drawing';
import { massSpringDamperDrawing } from './mass-spring-damper';
import { singleTrackDrawing } from './single-track';
import { suspendedCabinDrawing } from './suspended-cabin';
import { twoMassDriveDrawing } from './two-mass-drive';

export type { Drawing, DrawingItem, Point } from './drawing';

const drawings: Readonly<Record<TemplateId, Drawing>> = {
  'mass-spring-damper': massSpringDamperDrawing,
  'two-mass-drive': twoMassDriveDrawing,
  'balancing-carrier': balancingCarrierDrawing,
  'suspended-cabin': suspendedCabinDrawing,
  'single-track': singleTrackDrawing,
};

/** The picture of a template's machine. */
export function drawingOf(template: TemplateId): Drawing {
  return drawings[template];
}
