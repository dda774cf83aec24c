import { applyDecorators, SetMetadata } from '@nestjs/common';
import { ApiBearerAuth, ApiExtension } from '@nestjs/swagger';
import type { Permission } from '@app/contracts';

export const PERMISSION = 'permission';

/**
 * Says what a route takes. It documents, and a test finds routes without it; the check itself is the service's
 * (`AccessService.require`), since only it knows the plant of the thing that is asked for.
 */
export const Permit = (permission: Permission) =>
  applyDecorators(SetMetadata(PERMISSION, permission), ApiBearerAuth(), ApiExtension('x-permission', permission));
