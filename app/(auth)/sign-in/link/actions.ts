'use server';

import { publicFormAction } from '@/lib/http/action';
import { requestSignInLink, requestSignInLinkInput } from '@/lib/workflows/request-sign-in-link';

export const askForLink = publicFormAction({ name: 'sign_in.request_link', input: requestSignInLinkInput }, requestSignInLink);
