import { desk } from "./browser";
import { describePages } from "./pages";

describePages(desk);
