import ReactMarkdown from "react-markdown";

/** Markdown of a definition. Raw HTML is not read, and links go only to web addresses. */
export function Markdown({ text }: { text: string }) {
  return (
    <div className="max-w-prose [&>*+*]:mt-2 [&_a]:underline [&_ol]:list-decimal [&_ol]:pl-5 [&_ul]:list-disc [&_ul]:pl-5">
      <ReactMarkdown skipHtml disallowedElements={["img", "h1"]}>
        {text}
      </ReactMarkdown>
    </div>
  );
}
