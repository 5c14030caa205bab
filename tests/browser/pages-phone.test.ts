import { phone } from "./browser";
import { describePages } from "./pages";

describePages(phone, 360);
