import { acceptInvitationRequest } from '@eremite/shared/contracts/auth';
import { useMutation } from '@tanstack/react-query';
import type { z } from 'zod';
import { act } from '#lib/api-client.ts';

export const useAcceptInvitation = () =>
  useMutation({
    mutationFn: (json: z.input<typeof acceptInvitationRequest>) =>
      act('/invitations/accept', { method: 'POST', json }),
  });
