import { Outlet } from "react-router";
import { Mark } from "#app/components/ui/Mark";

export default function Auth() {
  return (
    <main id="main" className="grid min-h-screen grid-cols-1 grid-rows-[auto_1fr] bg-ground wide:grid-cols-[1fr_560px] wide:grid-rows-1">
      <div className="flex items-center justify-start px-6 pt-8 pb-2 wide:justify-center wide:p-0">
        <Mark className="h-auto w-[120px] wide:w-[min(42vw,520px)]" />
      </div>
      <div className="flex flex-col bg-plate wide:justify-center px-4 pt-5 pb-10 max-wide:border-t-2 tablet:px-6 wide:border-l-2 wide:border-ink wide:px-12 wide:py-14">
        <Outlet />
      </div>
    </main>
  );
}
