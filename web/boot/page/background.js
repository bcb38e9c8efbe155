// Runs a task of the application in a worker, so that the page stays at hand. The worker is made from the glue script
// that this document carries and gets the compiled module by message: it loads nothing.
(function (page) {
  "use strict";

  // Runs inside the worker, behind the glue. A panic is reported as the page's own are.
  function inside() {
    self.onmessage = function (event) {
      var order = event.data;
      function tell(kind, text) { self.postMessage({ kind: kind, text: text }); }
      self.spokeshave = { crashed: function (words) { tell("fault", words); } };
      Promise.resolve()
        .then(function () { return wasm_bindgen({ module_or_path: order.module }); })
        .then(function () { wasm_bindgen[order.task](order.text, tell); })
        .catch(function (fault) { tell("fault", String(fault && fault.message || fault)); });
    };
  }

  // Starts a task; `hear` gets (kind, text) until it ends with "fault" or the task's own last word. Returns the worker,
  // whose terminate() calls it off, or null where the browser refuses one.
  page.background = function (task, text, hear) {
    var blob = new Blob([page.glue, "\n(", String(inside), ")();"], { type: "text/javascript" });
    var url = URL.createObjectURL(blob);
    var worker;
    try {
      worker = new Worker(url);
    } catch (refused) {
      return null;
    } finally {
      window.setTimeout(function () { URL.revokeObjectURL(url); }, 10000);
    }
    worker.onmessage = function (event) { hear(event.data.kind, event.data.text); };
    worker.onerror = function (event) {
      event.preventDefault();
      worker.terminate();
      hear("fault", event.message || "the worker did not start");
    };
    worker.postMessage({ module: page.module, task: task, text: text });
    return worker;
  };
})(window.spokeshave);
