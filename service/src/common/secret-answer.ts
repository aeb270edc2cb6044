import { SetMetadata } from '@nestjs/common';

export const IS_SECRET = 'eremite:secret-answer';
/** The answer holds what is shown once and stored hashed only, so it is never kept to be given again. */
export const SecretAnswer = () => SetMetadata(IS_SECRET, true);
