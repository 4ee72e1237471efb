import { NothingHere } from '../_components/nothing-here';

/** Inside the shell, so that whoever is signed in can go on. */
export default function NotFoundSignedIn() {
  return <NothingHere />;
}
