'use server';

import { canBeHere } from '@/lib/auth/permissions';
import { action, formAction, publicFormAction } from '@/lib/http/action';
import {
  changeName,
  changeNameInput,
  chooseDepartment,
  chooseDepartmentInput,
  chooseRemarkMail,
  chooseRemarkMailInput,
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

export const saveRemarkMail = action(
  { name: 'account.choose_remark_mail', can: canBeHere, input: chooseRemarkMailInput, revalidate: () => ['/account'] },
  chooseRemarkMail,
);

export const endSessions = action(
  { name: 'account.sign_out_everywhere', can: canBeHere, input: signOutEverywhereInput },
  signOutEverywhere,
);

export const eraseAccount = publicFormAction({ name: 'account.erase', input: eraseOwnAccountInput }, eraseOwnAccount);
