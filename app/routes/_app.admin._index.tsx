import { redirect } from "react-router";

export function loader() {
  throw redirect("/admin/people");
}

export default function Admin() {
  return null;
}
