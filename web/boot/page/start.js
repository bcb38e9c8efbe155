// Unpacks the WebAssembly module that the file carries and starts the application.
(function (page) {
  "use strict";

  function missing() {
    var lacks = [];
    if (typeof WebAssembly !== "object") { lacks.push("WebAssembly"); }
    if (typeof DecompressionStream !== "function") { lacks.push("DecompressionStream"); }
    return lacks;
  }

  // The bytes that stand as base64 in a node.
  function bytesOf(id) {
    var text = atob(document.getElementById(id).textContent.trim());
    var bytes = new Uint8Array(text.length);
    for (var i = 0; i < text.length; i += 1) { bytes[i] = text.charCodeAt(i); }
    return bytes;
  }

  function gunzip(bytes) {
    var stream = new Blob([bytes]).stream().pipeThrough(new DecompressionStream("gzip"));
    return new Response(stream).arrayBuffer();
  }

  // The opener is a small module in the browser's own packing; it opens the large one.
  function unpack() {
    return gunzip(bytesOf("page-opener"))
      .then(function (bytes) { return page_opener({ module_or_path: bytes }); })
      .then(function () { return page_opener.open(document.getElementById("page-engine").textContent); });
  }

  // The JavaScript side of the large module, run as a script of the page; kept for workers.
  function runGlue() {
    return gunzip(bytesOf("page-glue")).then(function (bytes) {
      var script = document.createElement("script");
      page.glue = script.textContent = new TextDecoder().decode(bytes);
      document.head.appendChild(script);
      script.remove();
    });
  }

  function start() {
    runGlue()
      .then(unpack)
      .then(function (bytes) { return WebAssembly.compile(bytes); })
      .then(function (module) {
        page.module = module; // a worker gets it by message
        return wasm_bindgen({ module_or_path: module });
      })
      .then(function () {
        wasm_bindgen.start();
        page.startedMs = performance.now();
      })
      .catch(function (fault) { page.crashed(String(fault && fault.stack || fault)); });
  }

  window.addEventListener("error", function (event) {
    // Harmless and common: a layout observer that will be called again in the next frame.
    if (/^ResizeObserver loop/.test(event.message)) { return; }
    page.crashed(event.message + (event.error && event.error.stack ? "\n" + event.error.stack : ""));
  });
  window.addEventListener("unhandledrejection", function (event) {
    // Other rejections (a clipboard refused, say) leave the application whole.
    if (typeof WebAssembly === "object" && event.reason instanceof WebAssembly.RuntimeError) {
      page.crashed(String(event.reason.stack || event.reason));
    }
  });

  document.addEventListener("DOMContentLoaded", function () {
    page.clean();
    var lacks = missing();
    if (lacks.length) {
      page.cannotStart("This browser is too old for the page: it lacks " + lacks.join(" and ") +
        ". Open the file in Firefox 113, Chrome or Edge 96, Safari 16.4, or anything newer.");
    } else if (page.keep.heldBack()) {
      page.askFirst(start);
    } else {
      start();
    }
  });
})(window.spokeshave);
