import { applyDecorators, SetMetadata } from '@nestjs/common';
import { ApiExtension } from '@nestjs/swagger';

export const IS_PUBLIC = 'isPublic';

/** A route that needs no sign-in. */
export const Public = () => applyDecorators(SetMetadata(IS_PUBLIC, true), ApiExtension('x-permission', 'public'));
