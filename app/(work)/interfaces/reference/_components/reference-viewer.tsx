"use client";

import dynamic from "next/dynamic";
import { useEffect } from "react";
import "swagger-ui-react/swagger-ui.css";

const SwaggerUI = dynamic(() => import("swagger-ui-react"), {
  ssr: false,
  loading: () => <p className="px-6 py-8 text-muted">Loading the reference …</p>,
});

/** The viewer has a class of its own for its dark colours. */
function useSchemeOfViewer() {
  useEffect(() => {
    const { documentElement: root } = document;
    const follow = () => root.classList.toggle("dark-mode", root.classList.contains("dark"));
    const observer = new MutationObserver(follow);
    observer.observe(root, { attributes: true, attributeFilter: ["class"] });
    follow();
    return () => {
      observer.disconnect();
      root.classList.remove("dark-mode");
    };
  }, []);
}

/** Every operation of the interface, to read and to try. */
export function ReferenceViewer({ address }: { address: string }) {
  useSchemeOfViewer();
  return (
    <div className="overflow-x-auto border border-rule bg-sheet max-md:border-x-0">
      <SwaggerUI
        url={address}
        docExpansion="list"
        defaultModelsExpandDepth={-1}
        supportedSubmitMethods={["get", "post", "put", "delete"]}
      />
    </div>
  );
}
