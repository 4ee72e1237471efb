'use server';

import { canBeHere } from '@/lib/auth/permissions';
import { action, formAction, publicFormAction } from '@/lib/http/action';
import {
  changeName,
  changeNameInput,
  chooseDepartment,
  chooseDepartmentInput,
  signOutEverywhere,
  signOutEverywhereInput,
} from '@/lib/workflows/change-own-account';
import { changePassword, changePasswordInput } from '@/lib/workflows/change-password';
import { eraseOwnAccount, eraseOwnAccountInput } from '@/lib/workflows/erase-own-account';

const wholeSite = () => ['/'];

export const saveName = formAction(
  { name: 'account.change_name', can: canBeHere, input: changeNameInput, revalidate: () => ['/account'] },
  changeName,
);

export const savePassword = publicFormAction({ name: 'account.change_password', input: changePasswordInput }, changePassword);

export const workInDepartment = action(
  { name: 'account.choose_department', can: canBeHere, input: chooseDepartmentInput, revalidate: wholeSite },
  chooseDepartment,
);

export const endSessions = action(
  { name: 'account.sign_out_everywhere', can: canBeHere, input: signOutEverywhereInput },
  signOutEverywhere,
);

export const eraseAccount = publicFormAction({ name: 'account.erase', input: eraseOwnAccountInput }, eraseOwnAccount);
