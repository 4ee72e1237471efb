export { default } from '../../../courses/loading';
