/** Version of the template's content. A newer template never changes an install that already has its board. */
export const TEMPLATE_VERSION = "1.0.0";
