import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { changeRemark, changeRemarkInput, deleteRemarkInput, takeBackRemark } from '@/lib/workflows/remarks';

export const PATCH = route({ name: 'remarks.change', can: canBeHere, body: 'json', input: changeRemarkInput }, changeRemark);
export const DELETE = route({ name: 'remarks.takeBack', can: canBeHere, input: deleteRemarkInput }, takeBackRemark);
