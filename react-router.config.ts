import type { Config } from "@react-router/dev/config";

export default {
  ssr: true,
  // The whole route table is sent with the first page: on hangar Wi-Fi a late look-up of routes is a dead click.
  routeDiscovery: { mode: "initial" },
  future: {
    v8_middleware: true,
    v8_splitRouteModules: true,
    v8_viteEnvironmentApi: true,
    v8_passThroughRequests: true,
    v8_trailingSlashAwareDataRequests: true,
  },
} satisfies Config;
