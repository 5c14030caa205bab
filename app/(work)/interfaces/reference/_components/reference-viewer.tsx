"use client";

import dynamic from "next/dynamic";
import "swagger-ui-react/swagger-ui.css";

const SwaggerUI = dynamic(() => import("swagger-ui-react"), {
  ssr: false,
  loading: () => <p className="px-6 py-8 text-muted">Loading the reference …</p>,
});

/** Every operation of the interface, to read and to try. The viewer knows light colours only. */
export function ReferenceViewer({ address }: { address: string }) {
  return (
    <div className="border border-rule bg-[#fff] text-[#16232b] max-md:border-x-0">
      <SwaggerUI
        url={address}
        docExpansion="list"
        defaultModelsExpandDepth={-1}
        supportedSubmitMethods={["get", "post", "put", "delete"]}
      />
    </div>
  );
}
