"""One self-contained HTML file to a tagged PDF: the same bytes each time."""


class PdfUnavailableError(Exception):
    """The libraries that lay out text for PDF are not on this machine; HTML can still be made."""


def pdf(html: str) -> bytes:
    """The PDF of a document. PdfUnavailableError if the text layout library (Pango) cannot be loaded."""
    try:
        from weasyprint import HTML
        from weasyprint.urls import URLFetcher
    except (ImportError, OSError) as error:
        raise PdfUnavailableError(
            f"found no text layout library Pango, which PDF needs ({error}); expected it to be installed. "
            "HTML and JSON need nothing. Debian, Ubuntu: sudo apt-get install libpango-1.0-0 libpangoft2-1.0-0 "
            "libharfbuzz-subset0. Fedora: sudo dnf install pango. macOS: brew install pango. Windows: winget install -e --id MSYS2.MSYS2, "
            "then in its shell: pacman -S mingw-w64-ucrt-x86_64-pango"
        ) from error
    made = HTML(string=html, url_fetcher=URLFetcher(allowed_protocols=("data",))).write_pdf(pdf_variant="pdf/ua-1")
    if not isinstance(made, bytes):
        raise TypeError("the PDF library gave no bytes")
    return made
