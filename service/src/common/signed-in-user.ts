import { createParamDecorator, type ExecutionContext, SetMetadata } from '@nestjs/common';
import type { Request } from 'express';

export interface SignedInUser {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly isAdministrator: boolean;
  /** `read` tokens may only look. */
  readonly scope: 'read' | 'write';
  /** The browser session, absent for a personal token. */
  readonly sessionId?: string;
}

export type SignedInRequest = Request & { user?: SignedInUser; id?: string };

/** The account behind the request; on a public route it may be absent. */
export const CurrentUser = createParamDecorator(
  (_: unknown, context: ExecutionContext) => context.switchToHttp().getRequest<SignedInRequest>().user,
);

export const IS_PUBLIC = 'eremite:public';
/** The route answers without signing in. */
export const Public = () => SetMetadata(IS_PUBLIC, true);
